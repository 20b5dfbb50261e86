import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { schemes } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { HereBeat } from '#shared/scheme/presence'
import { tellDraftNews } from './draft-news'

/** The version of a scheme's draft, without its body; scheme/not-found outside the workshop. */
export async function draftVersion(tx: Ctx, schemeId: string): Promise<number> {
  const [scheme] = await tx.db.select({ version: schemes.version }).from(schemes)
    .where(and(eq(schemes.id, schemeId), eq(schemes.workshopId, tx.workshopId)))
  if (!scheme) throw new Problem({ code: 'scheme/not-found' })
  return scheme.version
}

/** Says that one has a draft open, and which coat one has in hand. Nothing of it is stored. */
export async function beHere(ctx: Ctx, schemeId: string, { tab, coatId }: HereBeat): Promise<void> {
  assertMay(ctx, 'scheme:read')
  await inTransaction(ctx, async (tx) => {
    await draftVersion(tx, schemeId)
    await tellDraftNews(tx, { is: 'here', workshopId: tx.workshopId, schemeId, personId: tx.personId, tab, coatId })
  })
}

/** Says that one has closed it. */
export async function beGone(ctx: Ctx, schemeId: string, tab: string): Promise<void> {
  await inTransaction(ctx, tx => tellDraftNews(tx, { is: 'gone', workshopId: tx.workshopId, schemeId, personId: tx.personId, tab }))
}
