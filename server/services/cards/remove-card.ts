import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { cards } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'

/** Takes a card away; its link ends with it. */
export async function removeCard(ctx: Ctx, cardId: string): Promise<void> {
  assertMay(ctx, 'card:change')
  await inTransaction(ctx, async (tx) => {
    const gone = await tx.db.delete(cards).where(and(eq(cards.id, cardId), eq(cards.workshopId, tx.workshopId))).returning({ id: cards.id })
    if (gone.length === 0) throw new Problem({ code: 'card/not-found' })
  })
}
