import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import type { SchemeView } from '#shared/scheme/scheme-view'
import { getScheme } from './get-scheme'
import { putDraft } from './save-draft'
import { holdScheme, revisionInWorkshop } from './scheme-in-workshop'

/** Makes an older revision the draft again; the revisions stay as they are. Its paints are then those of today's shelf. */
export async function restoreRevision(ctx: Ctx, schemeId: string, version: number, number: number): Promise<SchemeView> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    const scheme = await holdScheme(tx, schemeId, version)
    const revision = await revisionInWorkshop(tx, schemeId, number)
    await putDraft(tx, scheme, revision.body)
    return getScheme(tx, schemeId)
  })
}
