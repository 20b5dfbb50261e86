import { eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { schemes } from '#server/db/tables'
import type { SchemeBody } from '#shared/scheme/body'
import type { DraftSavedView } from '#shared/scheme/scheme-view'
import { sameValue } from '#shared/scheme/canonical'
import { blankInWorkshop } from './blank-in-workshop'
import { tellDraftNews } from './draft-news'
import { holdScheme, type SchemeRow } from './scheme-in-workshop'

/** Saves a draft that was made from `version`. Refused when somebody saved meanwhile; the same body again changes nothing. */
export async function saveDraft(ctx: Ctx, schemeId: string, version: number, body: SchemeBody): Promise<DraftSavedView> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    const scheme = await holdScheme(tx, schemeId, version)
    const saved = sameValue(scheme.draft, body) ? scheme : await putDraft(tx, scheme, body)
    return { version: saved.version, savedAt: saved.savedAt.toISOString() }
  })
}

/** Makes a body the draft of a scheme that is held by this transaction. */
export async function putDraft(tx: Ctx, scheme: SchemeRow, body: SchemeBody): Promise<SchemeRow> {
  await blankInWorkshop(tx, body.blankId)
  const [saved] = await tx.db.update(schemes)
    .set({ draft: body, blankId: body.blankId, version: scheme.version + 1, savedAt: new Date(), savedBy: tx.personId })
    .where(eq(schemes.id, scheme.id)).returning()
  await tellDraftNews(tx, { is: 'saved', workshopId: tx.workshopId, schemeId: scheme.id })
  return saved!
}
