import { z } from 'zod'
import type { KeptDraft } from './kept-draft'
import { SchemeBody } from '#shared/scheme/body'
import { startHistory } from '#shared/scheme/history'

/** One unsaved draft as an earlier form of the application left it: without undo, and without what it was made from. */
const OldDraft = z.object({ version: z.number().int(), body: SchemeBody })

const keyOf = (personId: string, schemeId: string) => `countershade:draft:${personId}:${schemeId}`

/** Unsaved work that was left in the browser's small storage; null when there is none that can be read. */
export function readOldDraft(storage: Pick<Storage, 'getItem'>, personId: string, schemeId: string): KeptDraft | null {
  try {
    const left = OldDraft.parse(JSON.parse(storage.getItem(keyOf(personId, schemeId)) ?? ''))
    return { version: left.version, base: null, isUnsaved: true, history: { ...startHistory(left.body), past: [], future: [], last: null } }
  }
  catch {
    return null
  }
}

/** Removes it, once it lies elsewhere. */
export function removeOldDraft(storage: Pick<Storage, 'removeItem'>, personId: string, schemeId: string): void {
  try {
    storage.removeItem(keyOf(personId, schemeId))
  }
  catch {
    // A storage that is shut gives nothing to read either.
  }
}
