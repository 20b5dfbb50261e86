import { and, desc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { cards } from '#server/db/tables'
import type { CardView } from '#shared/cards/card'
import { cardInWorkshop, cardsWithNames, cardView } from './card-view'

/** The workshop's cards, newest first; of one scheme when it is named. */
export async function listCards(ctx: Ctx, schemeId?: string): Promise<CardView[]> {
  assertMay(ctx, 'card:read')
  return inTransaction(ctx, async (tx) => {
    const rows = await cardsWithNames(tx)
      .where(and(eq(cards.workshopId, tx.workshopId), schemeId ? eq(cards.schemeId, schemeId) : undefined))
      .orderBy(desc(cards.createdAt), desc(cards.id))
    return rows.map(cardView)
  })
}

/** One card of the workshop, or card/not-found. */
export async function getCard(ctx: Ctx, cardId: string): Promise<CardView> {
  assertMay(ctx, 'card:read')
  return inTransaction(ctx, async tx => cardView(await cardInWorkshop(tx, cardId)))
}
