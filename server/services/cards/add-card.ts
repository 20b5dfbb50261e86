import { and, asc, desc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { blanks, cards, photos, revisions, schemes, workshops } from '#server/db/tables'
import { CARD_PHOTOS_MAX, type CardContent, type CardView } from '#shared/cards/card'
import { cardChips } from '#shared/cards/card-chips'
import { Problem } from '#shared/errors/problem'
import { cardView } from './card-view'

/** Starts a card of a published scheme with what a customer may know of it: its name, fish, blank, photos and colours as seen. */
export async function addCard(ctx: Ctx, schemeId: string): Promise<CardView> {
  assertMay(ctx, 'card:change')
  return inTransaction(ctx, async (tx) => {
    const [found] = await tx.db.select({ scheme: schemes, blank: blanks.name, workshop: workshops.name })
      .from(schemes).innerJoin(blanks, eq(blanks.id, schemes.blankId)).innerJoin(workshops, eq(workshops.id, schemes.workshopId))
      .where(and(eq(schemes.id, schemeId), eq(schemes.workshopId, tx.workshopId)))
    if (!found) throw new Problem({ code: 'scheme/not-found' })
    const [head] = await tx.db.select({ body: revisions.body, materials: revisions.materials }).from(revisions)
      .where(and(eq(revisions.schemeId, schemeId), eq(revisions.workshopId, tx.workshopId))).orderBy(desc(revisions.number)).limit(1)
    if (!head) throw new Problem({ code: 'scheme/never-published' })
    const shown = await tx.db.select({ id: photos.id }).from(photos)
      .where(and(eq(photos.schemeId, schemeId), eq(photos.workshopId, tx.workshopId))).orderBy(asc(photos.position), asc(photos.createdAt), asc(photos.id)).limit(CARD_PHOTOS_MAX)

    const content: CardContent = {
      title: found.scheme.name,
      words: '',
      fish: found.scheme.fish,
      sizes: `${head.materials.blank.shape.length} mm`,
      price: '',
      leadTime: '',
      photoIds: shown.map(photo => photo.id),
      showsChips: true,
      blank: found.blank,
      chips: cardChips(head),
    }
    const [card] = await tx.db.insert(cards).values({ workshopId: tx.workshopId, schemeId, content, createdBy: tx.personId }).returning()
    return cardView({ card: card!, schemeName: found.scheme.name, workshop: found.workshop })
  })
}
