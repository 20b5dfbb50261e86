import { and, eq, inArray, isNull } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { declare, inTransactionAs } from '#server/services/in-transaction'
import { cards, photos, workshops } from '#server/db/tables'
import type { ObjectStore, StoredObject } from '#server/photos/object-store'
import { photoKeys } from '#server/photos/photo-keys'
import { settings } from '#server/settings'
import { CardContent, type CardByLink, type PublicCard, type PublicPhoto } from '#shared/cards/card'
import { shownCard } from '#shared/cards/shown-card'
import { Problem } from '#shared/errors/problem'
import { tokenHash } from './card-link'

interface SharedCard { workshopId: string, workshop: string, content: CardContent, photos: PublicPhoto[] }

/** The card behind a link; unknown and revoked links look the same. The photos are read as the card's workshop, and only those the card names. */
async function sharedCard(db: Database, token: string): Promise<SharedCard> {
  return inTransactionAs(db, { tokenHash: tokenHash(token) }, async (tx) => {
    const [card] = await tx.select({ workshopId: cards.workshopId, content: cards.content }).from(cards)
      .where(and(eq(cards.tokenHash, tokenHash(token)), isNull(cards.revokedAt)))
    if (!card) throw new Problem({ code: 'card/not-found' })
    const content = CardContent.parse(card.content)
    await declare(tx, { workshopId: card.workshopId })
    const [workshop] = await tx.select({ name: workshops.name }).from(workshops).where(eq(workshops.id, card.workshopId))
    const found = content.photoIds.length === 0
      ? []
      : await tx.select({ id: photos.id, width: photos.width, height: photos.height, alt: photos.alt }).from(photos)
          .where(and(eq(photos.workshopId, card.workshopId), inArray(photos.id, content.photoIds)))
    const inOrder = content.photoIds.flatMap(id => found.filter(photo => photo.id === id))
    return { workshopId: card.workshopId, workshop: workshop!.name, content, photos: inOrder }
  })
}

/** What a customer sees by a link. */
export async function publicCard(db: Database, token: string): Promise<PublicCard> {
  const { workshop, content, photos } = await sharedCard(db, token)
  return shownCard(content, workshop, photos)
}

/** The same, with the address it stands at. */
export async function cardByLink(db: Database, token: string): Promise<CardByLink> {
  return { card: await publicCard(db, token), address: `${settings().publicUrl}/c/${token}` }
}

/** A copy of a photo that a shared card shows. */
export async function publicPhoto(db: Database, token: string, photoId: string, file: string, store: ObjectStore): Promise<StoredObject> {
  const card = await sharedCard(db, token)
  if (!card.photos.some(photo => photo.id === photoId)) throw new Problem({ code: 'photo/not-found' })
  return stored(store, photoKeys.rendition(card.workshopId, photoId, file))
}

/** The picture a link preview shows: the card's first photo. */
export async function publicPreview(db: Database, token: string, store: ObjectStore): Promise<StoredObject> {
  const card = await sharedCard(db, token)
  const [first] = card.photos
  if (!first) throw new Problem({ code: 'photo/not-found' })
  return stored(store, photoKeys.rendition(card.workshopId, first.id, 'preview.jpg'))
}

async function stored(store: ObjectStore, key: string): Promise<StoredObject> {
  const found = await store.get(key)
  if (!found) throw new Problem({ code: 'photo/not-found' })
  return found
}
