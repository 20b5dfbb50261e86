import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { cards, schemes } from '#server/db/tables'
import { settings } from '#server/settings'
import { cardToken, tokenHash } from './card-link'
import { CardContent, type CardView } from '#shared/cards/card'
import { Problem } from '#shared/errors/problem'

export type CardRow = typeof cards.$inferSelect

/** The only way from a card's row to the wire of its own workshop. */
export function cardView(row: CardRow, schemeName: string): CardView {
  return {
    ...CardContent.parse(row.content),
    id: row.id,
    schemeId: row.schemeId,
    schemeName,
    version: row.version,
    state: row.revokedAt ? 'revoked' : row.sharedAt ? 'shared' : 'not shared',
    link: linkOf(row),
    sharedAt: row.sharedAt?.toISOString() ?? null,
    createdAt: row.createdAt.toISOString(),
  }
}

/** The public address, while the card is shared and this server can still work its secret out. */
function linkOf(row: CardRow): string | null {
  if (!row.sharedAt || row.revokedAt) return null
  const token = cardToken(settings().sessionPassword, row.id, row.sharedAt)
  return tokenHash(token) === row.tokenHash ? `${settings().publicUrl}/c/${token}` : null
}

/** A card of this workshop with its scheme's name, or card/not-found. Call inside a transaction. */
export async function cardInWorkshop(tx: Ctx, cardId: string): Promise<{ card: CardRow, schemeName: string }> {
  const [row] = await tx.db.select({ card: cards, schemeName: schemes.name })
    .from(cards).innerJoin(schemes, eq(schemes.id, cards.schemeId))
    .where(and(eq(cards.id, cardId), eq(cards.workshopId, tx.workshopId)))
  if (!row) throw new Problem({ code: 'card/not-found' })
  return row
}
