import { z } from 'zod'
import { SchemeBody } from '#shared/scheme/body'

const Steps = z.array(z.object({ body: SchemeBody, words: z.string() }))

/** A draft as it lies on the device: what one has now with its undo, and what the server had when it was made. */
export const KeptDraft = z.object({
  /** The version it was made from. */
  version: z.number().int(),
  /** The body of that version; null when it is not known. */
  base: SchemeBody.nullable(),
  /** Whether the server does not have it yet. */
  isUnsaved: z.boolean(),
  history: z.object({ past: Steps, present: SchemeBody, future: Steps, last: z.null() }),
})
export type KeptDraft = z.output<typeof KeptDraft>

/** Where drafts lie on this device. */
export interface DraftShelf {
  /** What this tab kept of a scheme, or unsaved work of a tab that is gone; null when there is none. */
  read: (schemeId: string) => Promise<KeptDraft | null>
  /** Keeps a draft. When it has returned it survives a sudden end; throws when the device has no room for it. */
  write: (schemeId: string, kept: KeptDraft) => Promise<void>
}

/** What to go on with when a scheme is opened and the device may hold a draft of it. */
export type Opening
  /** Nothing kept, or nothing of use: the server's draft. */
  = | { is: 'as saved' }
    /** All of it is saved, and there is more to undo. */
    | { is: 'history', kept: KeptDraft }
    /** Unsaved work made from this very version: goes on and is saved. */
    | { is: 'unsaved', kept: KeptDraft }
    /** Made from an older version: made one with what was saved since. */
    | { is: 'behind', kept: KeptDraft }

/** Decides between what the device kept and what the server has. `same` tells whether two bodies are one finish. */
export function openingOf(
  server: { version: number, body: SchemeBody }, kept: KeptDraft | null, same: (a: SchemeBody, b: SchemeBody) => boolean,
): Opening {
  if (!kept) return { is: 'as saved' }
  if (same(kept.history.present, server.body)) return { is: 'history', kept }
  if (kept.version === server.version && kept.isUnsaved) return { is: 'unsaved', kept }
  // Saved work of an older version: only its undo is still of use, and only where one knows what it was made from.
  return !kept.isUnsaved && kept.base === null ? { is: 'as saved' } : { is: 'behind', kept }
}
