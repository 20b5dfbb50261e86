import type { CardContent, PublicCard, PublicPhoto } from './card'

/** What a customer sees of a card: built field by field, so that nothing can follow that is not named here. Photos that are gone are left out. */
export function shownCard(content: CardContent, workshop: string, photos: readonly PublicPhoto[]): PublicCard {
  const byId = new Map(photos.map(photo => [photo.id, photo]))
  return {
    workshop,
    title: content.title,
    words: content.words,
    fish: content.fish,
    blank: content.blank,
    sizes: content.sizes,
    price: content.price,
    leadTime: content.leadTime,
    chips: content.showsChips ? content.chips.map(({ where, colour, words }) => ({ where, colour, words })) : [],
    photos: content.photoIds.flatMap(id => byId.get(id) ?? []).map(({ id, width, height, alt }) => ({ id, width, height, alt })),
  }
}
