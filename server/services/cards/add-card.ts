import { and, asc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { cards, photos, schemes, workshops } from '#server/db/tables'
import { CARD_PHOTOS_MAX, type CardContent, type CardView } from '#shared/cards/card'
import { Problem } from '#shared/errors/problem'
import { cardView } from './card-view'
import { finishTold } from './finish-told'

/** Starts a card of a published scheme with what a customer may know of it: its name, fish, blank, photos and colours as seen. */
export async function addCard(ctx: Ctx, schemeId: string): Promise<CardView> {
  assertMay(ctx, 'card:change')
  return inTransaction(ctx, async (tx) => {
    const [found] = await tx.db.select({ scheme: schemes, workshop: workshops.name })
      .from(schemes).innerJoin(workshops, eq(workshops.id, schemes.workshopId))
      .where(and(eq(schemes.id, schemeId), eq(schemes.workshopId, tx.workshopId)))
    if (!found) throw new Problem({ code: 'scheme/not-found' })
    const { blank, chips, lengthMm } = await finishTold(tx, schemeId)
    const shown = await tx.db.select({ id: photos.id }).from(photos)
      .where(and(eq(photos.schemeId, schemeId), eq(photos.workshopId, tx.workshopId)))
      .orderBy(asc(photos.position), asc(photos.createdAt), asc(photos.id)).limit(CARD_PHOTOS_MAX)

    const content: CardContent = {
      title: found.scheme.name,
      words: '',
      fish: found.scheme.fish,
      sizes: `${lengthMm} mm`,
      price: '',
      leadTime: '',
      photoIds: shown.map(photo => photo.id),
      showsChips: true,
      blank,
      chips,
    }
    const [card] = await tx.db.insert(cards).values({ workshopId: tx.workshopId, schemeId, content, createdBy: tx.personId }).returning()
    return cardView({ card: card!, schemeName: found.scheme.name, workshop: found.workshop })
  })
}
