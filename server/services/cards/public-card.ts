import { and, eq, inArray, isNull } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { declare, inTransactionAs } from '#server/services/in-transaction'
import { cards, photos } from '#server/db/tables'
import type { ObjectStore, StoredObject } from '#server/photos/object-store'
import { photoKeys } from '#server/photos/photo-keys'
import { CardContent, type PublicCard } from '#shared/cards/card'
import { Problem } from '#shared/errors/problem'
import { tokenHash } from './card-link'

interface SharedCard { workshopId: string, content: CardContent, photos: { id: string, width: number, height: number, alt: string }[] }

/** The card behind a link; unknown and revoked links look the same. The photos are read as the card's workshop, and only those the card names. */
async function sharedCard(db: Database, token: string): Promise<SharedCard> {
  return inTransactionAs(db, { tokenHash: tokenHash(token) }, async (tx) => {
    const [card] = await tx.select({ workshopId: cards.workshopId, content: cards.content }).from(cards)
      .where(and(eq(cards.tokenHash, tokenHash(token)), isNull(cards.revokedAt)))
    if (!card) throw new Problem({ code: 'card/not-found' })
    const content = CardContent.parse(card.content)
    await declare(tx, { workshopId: card.workshopId })
    const found = content.photoIds.length === 0
      ? []
      : await tx.select({ id: photos.id, width: photos.width, height: photos.height, alt: photos.alt }).from(photos)
          .where(and(eq(photos.workshopId, card.workshopId), inArray(photos.id, content.photoIds)))
    const inOrder = content.photoIds.flatMap(id => found.filter(photo => photo.id === id))
    return { workshopId: card.workshopId, content, photos: inOrder }
  })
}

/** What a customer sees by a link: built field by field, so that nothing can follow that is not named here. */
export async function publicCard(db: Database, token: string): Promise<PublicCard> {
  const { content, photos } = await sharedCard(db, token)
  return {
    workshop: content.workshop,
    title: content.title,
    words: content.words,
    fish: content.fish,
    blank: content.blank,
    sizes: content.sizes,
    price: content.price,
    leadTime: content.leadTime,
    chips: content.showsChips ? content.chips.map(chip => ({ where: chip.where, colour: chip.colour, words: chip.words })) : [],
    photos: photos.map(photo => ({ id: photo.id, width: photo.width, height: photo.height, alt: photo.alt })),
  }
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
