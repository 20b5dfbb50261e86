import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { cards, schemes, workshops } from '#server/db/tables'
import { settings } from '#server/settings'
import { cardToken, tokenHash } from './card-link'
import { CardContent, type CardState, type CardView } from '#shared/cards/card'
import { Problem } from '#shared/errors/problem'

export type CardRow = typeof cards.$inferSelect

/** A card with what its scheme and its workshop are called today. */
export interface NamedCard { card: CardRow, schemeName: string, workshop: string }

/** The only way from a card's row to the wire of its own workshop. */
export function cardView({ card, schemeName, workshop }: NamedCard): CardView {
  return {
    ...CardContent.parse(card.content),
    id: card.id,
    workshop,
    schemeId: card.schemeId,
    schemeName,
    version: card.version,
    state: stateOf(card),
    link: linkOf(card),
    sharedAt: card.sharedAt?.toISOString() ?? null,
    revokedAt: card.revokedAt?.toISOString() ?? null,
    createdAt: card.createdAt.toISOString(),
  }
}

/** Whether a customer can see the card now. */
export function stateOf(card: CardRow): CardState {
  if (card.revokedAt) return 'revoked'
  return card.sharedAt ? 'shared' : 'not shared'
}

/** The public address, while the card is shared and this server can still work its secret out. */
function linkOf(row: CardRow): string | null {
  if (!row.sharedAt || row.revokedAt) return null
  const token = cardToken(settings().sessionPassword, row.id, row.sharedAt)
  return tokenHash(token) === row.tokenHash ? `${settings().publicUrl}/c/${token}` : null
}

/** Cards with their names, to be narrowed down by who asks. Call inside a transaction. */
export function cardsWithNames(tx: Ctx) {
  return tx.db.select({ card: cards, schemeName: schemes.name, workshop: workshops.name })
    .from(cards).innerJoin(schemes, eq(schemes.id, cards.schemeId)).innerJoin(workshops, eq(workshops.id, cards.workshopId))
}

const own = (tx: Ctx, cardId: string) => and(eq(cards.id, cardId), eq(cards.workshopId, tx.workshopId))

/** A card of this workshop, or card/not-found. Call inside a transaction. */
export async function cardInWorkshop(tx: Ctx, cardId: string): Promise<NamedCard> {
  const [row] = await cardsWithNames(tx).where(own(tx, cardId))
  if (!row) throw new Problem({ code: 'card/not-found' })
  return row
}

/** The same, and until the transaction ends nobody else changes, shares or revokes it. */
export async function cardToChange(tx: Ctx, cardId: string): Promise<NamedCard> {
  const [row] = await cardsWithNames(tx).where(own(tx, cardId)).for('update', { of: cards })
  if (!row) throw new Problem({ code: 'card/not-found' })
  return row
}
