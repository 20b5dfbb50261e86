import { and, eq, inArray } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { cards, photos } from '#server/db/tables'
import { settings } from '#server/settings'
import { CardContent, type CardDraft, type CardView } from '#shared/cards/card'
import { Problem } from '#shared/errors/problem'
import { cardToken, tokenHash } from './card-link'
import { cardInWorkshop, cardView } from './card-view'

/** Changes the words and photos of a card that is still at `version`. What is shared changes at once. */
export async function changeCard(ctx: Ctx, cardId: string, version: number, draft: CardDraft): Promise<CardView> {
  assertMay(ctx, 'card:change')
  return inTransaction(ctx, async (tx) => {
    const { card, schemeName } = await cardInWorkshop(tx, cardId)
    if (card.version !== version) throw new Problem({ code: 'card/changed-meanwhile' })
    const own = draft.photoIds.length === 0
      ? []
      : await tx.db.select({ id: photos.id }).from(photos)
          .where(and(eq(photos.workshopId, tx.workshopId), eq(photos.schemeId, card.schemeId), inArray(photos.id, draft.photoIds)))
    const known = new Set(own.map(photo => photo.id))
    const content: CardContent = { ...CardContent.parse(card.content), ...draft, photoIds: draft.photoIds.filter(id => known.has(id)) }
    const [changed] = await tx.db.update(cards).set({ content, version: version + 1 })
      .where(and(eq(cards.id, cardId), eq(cards.version, version))).returning()
    if (!changed) throw new Problem({ code: 'card/changed-meanwhile' })
    return cardView(changed, schemeName)
  })
}

/** Shares a card by a link nobody can guess. Sharing again makes a new link; the old one ends. */
export async function shareCard(ctx: Ctx, cardId: string): Promise<CardView> {
  assertMay(ctx, 'card:change')
  return inTransaction(ctx, async (tx) => {
    const { card, schemeName } = await cardInWorkshop(tx, cardId)
    if (CardContent.parse(card.content).photoIds.length === 0) throw new Problem({ code: 'card/no-photo' })
    const sharedAt = new Date()
    const token = cardToken(settings().sessionPassword, cardId, sharedAt)
    const [shared] = await tx.db.update(cards)
      .set({ sharedAt, revokedAt: null, tokenHash: tokenHash(token), version: card.version + 1 }).where(eq(cards.id, cardId)).returning()
    return cardView(shared!, schemeName)
  })
}

/** Ends a card's link at once, everywhere. */
export async function revokeCard(ctx: Ctx, cardId: string): Promise<CardView> {
  assertMay(ctx, 'card:change')
  return inTransaction(ctx, async (tx) => {
    const { card, schemeName } = await cardInWorkshop(tx, cardId)
    const [revoked] = await tx.db.update(cards)
      .set({ revokedAt: new Date(), tokenHash: null, version: card.version + 1 }).where(eq(cards.id, cardId)).returning()
    return cardView(revoked!, schemeName)
  })
}

/** Takes a card away; its link ends with it. */
export async function removeCard(ctx: Ctx, cardId: string): Promise<void> {
  assertMay(ctx, 'card:change')
  await inTransaction(ctx, async (tx) => {
    await cardInWorkshop(tx, cardId)
    await tx.db.delete(cards).where(eq(cards.id, cardId))
  })
}
