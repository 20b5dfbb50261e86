import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { cards } from '#server/db/tables'
import { CardContent, type CardDraft, type CardView } from '#shared/cards/card'
import { Problem } from '#shared/errors/problem'
import { cardToChange, cardView, stateOf } from './card-view'
import { photosOfScheme } from './photos-of-scheme'

/** Changes the words and photos of a card that is still at `version`. What is shared changes at once, and keeps a photo. */
export async function changeCard(ctx: Ctx, cardId: string, version: number, draft: CardDraft): Promise<CardView> {
  assertMay(ctx, 'card:change')
  return inTransaction(ctx, async (tx) => {
    const { card, ...names } = await cardToChange(tx, cardId)
    if (card.version !== version) throw new Problem({ code: 'card/changed-meanwhile' })
    const photoIds = await photosOfScheme(tx, card.schemeId, draft.photoIds)
    if (photoIds.length === 0 && stateOf(card) === 'shared') throw new Problem({ code: 'card/no-photo' })
    const content: CardContent = { ...CardContent.parse(card.content), ...draft, photoIds }
    const [changed] = await tx.db.update(cards).set({ content, version: version + 1 })
      .where(and(eq(cards.id, cardId), eq(cards.workshopId, tx.workshopId))).returning()
    return cardView({ card: changed!, ...names })
  })
}
