import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { cards } from '#server/db/tables'
import { settings } from '#server/settings'
import { CardContent, type CardView } from '#shared/cards/card'
import { Problem } from '#shared/errors/problem'
import { cardToken, tokenHash } from './card-link'
import { cardToChange, cardView, stateOf } from './card-view'
import { photosOfScheme } from './photos-of-scheme'

/** Shares a card by a link nobody can guess. Sharing again makes a new link; the old one ends. */
export async function shareCard(ctx: Ctx, cardId: string): Promise<CardView> {
  assertMay(ctx, 'card:change')
  return inTransaction(ctx, async (tx) => {
    const { card, ...names } = await cardToChange(tx, cardId)
    const shown = await photosOfScheme(tx, card.schemeId, CardContent.parse(card.content).photoIds)
    if (shown.length === 0) throw new Problem({ code: 'card/no-photo' })
    // A link made in the same millisecond would be the same link.
    const sharedAt = new Date(Math.max(Date.now(), (card.sharedAt?.getTime() ?? 0) + 1))
    const token = cardToken(settings().sessionPassword, cardId, sharedAt)
    const [shared] = await tx.db.update(cards)
      .set({ sharedAt, revokedAt: null, tokenHash: tokenHash(token), version: card.version + 1 })
      .where(and(eq(cards.id, cardId), eq(cards.workshopId, tx.workshopId))).returning()
    return cardView({ card: shared!, ...names })
  })
}

/** Ends a card's link at once, everywhere. A card without a link stays as it is. */
export async function revokeCard(ctx: Ctx, cardId: string): Promise<CardView> {
  assertMay(ctx, 'card:change')
  return inTransaction(ctx, async (tx) => {
    const { card, ...names } = await cardToChange(tx, cardId)
    if (stateOf(card) !== 'shared') return cardView({ card, ...names })
    const [revoked] = await tx.db.update(cards)
      .set({ revokedAt: new Date(), tokenHash: null, version: card.version + 1 })
      .where(and(eq(cards.id, cardId), eq(cards.workshopId, tx.workshopId))).returning()
    return cardView({ card: revoked!, ...names })
  })
}
