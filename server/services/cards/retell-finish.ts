import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { cards } from '#server/db/tables'
import { CardContent, type CardView } from '#shared/cards/card'
import { cardToChange, cardView } from './card-view'
import { finishTold } from './finish-told'

/** Takes a card's blank and colours anew from what was published since; what a person wrote stays. */
export async function retellFinish(ctx: Ctx, cardId: string): Promise<CardView> {
  assertMay(ctx, 'card:change')
  return inTransaction(ctx, async (tx) => {
    const { card, ...names } = await cardToChange(tx, cardId)
    const { blank, chips } = await finishTold(tx, card.schemeId)
    const content: CardContent = { ...CardContent.parse(card.content), blank, chips }
    const [changed] = await tx.db.update(cards).set({ content, version: card.version + 1 })
      .where(and(eq(cards.id, cardId), eq(cards.workshopId, tx.workshopId))).returning()
    return cardView({ card: changed!, ...names })
  })
}
