import { z } from 'zod'
import { SchemeBody } from '#shared/scheme/body'

/** An unsaved draft as it lies on the device: the body and the version it was made from. */
export const KeptDraft = z.object({ version: z.number().int(), body: SchemeBody })
export type KeptDraft = z.output<typeof KeptDraft>

/** Where unsaved drafts lie on this device. */
export interface DraftShelf {
  read: (schemeId: string) => KeptDraft | null
  write: (schemeId: string, kept: KeptDraft) => void
  remove: (schemeId: string) => void
}

/** Keeps unsaved drafts of one person in a browser's storage. A full or closed storage loses only the safety net, never the work on the page. */
export function draftShelf(storage: Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>, personId: string): DraftShelf {
  const key = (schemeId: string) => `countershade:draft:${personId}:${schemeId}`
  return {
    read(schemeId) {
      try {
        const text = storage.getItem(key(schemeId))
        return text === null ? null : KeptDraft.safeParse(JSON.parse(text)).data ?? null
      }
      catch {
        return null
      }
    },
    write(schemeId, kept) {
      try {
        storage.setItem(key(schemeId), JSON.stringify(kept))
      }
      catch {
        // Storage is full or shut: the page still holds the draft, and the next save goes to the server.
      }
    },
    remove(schemeId) {
      try {
        storage.removeItem(key(schemeId))
      }
      catch {
        // Nothing can be kept there, so nothing is left behind either.
      }
    },
  }
}

/** What to go on with when a scheme is opened and the device may hold unsaved work. */
export type Opening
  /** Nothing unsaved: the server's draft. */
  = | { is: 'as saved' }
    /** Unsaved work made from this very version: goes on and is saved. */
    | { is: 'unsaved', body: SchemeBody }
    /** Unsaved work made from an older version: the painter chooses. */
    | { is: 'conflict', mine: SchemeBody }

/** Decides between what the device kept and what the server has. `same` tells whether two bodies are one finish. */
export function openingOf(
  server: { version: number, body: SchemeBody }, kept: KeptDraft | null, same: (a: SchemeBody, b: SchemeBody) => boolean,
): Opening {
  if (!kept || same(kept.body, server.body)) return { is: 'as saved' }
  return kept.version === server.version ? { is: 'unsaved', body: kept.body } : { is: 'conflict', mine: kept.body }
}
