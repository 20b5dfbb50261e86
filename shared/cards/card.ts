import { z } from 'zod'
import { SchemeParams } from '#shared/scheme/scheme-input'

export const CARD_TITLE_MAX = 80
export const CARD_WORDS_MAX = 1200
export const CARD_LINE_MAX = 120
export const CARD_PHOTOS_MAX = 12
export const CARD_CHIPS_MAX = 8

export const CardParams = z.object({ cardId: z.uuid() })
export const NewCard = z.object({ schemeId: SchemeParams.shape.schemeId })
/** As it stands in an address: any text, since a wrong secret must look like an unknown one. */
export const CardTokenParams = z.object({ token: z.string().min(1).max(200) })

/** A colour of the finish as it is seen, where on the fish, and in words. Nothing of how it was made. */
export const CardChip = z.object({
  where: z.string().max(40),
  colour: z.string().regex(/^#[0-9a-f]{6}$/),
  words: z.string().max(80),
})
export type CardChip = z.output<typeof CardChip>

/** What a person writes on a card. */
export const CardDraft = z.object({
  title: z.string().trim().min(1).max(CARD_TITLE_MAX),
  words: z.string().trim().max(CARD_WORDS_MAX),
  fish: z.string().trim().max(CARD_LINE_MAX),
  sizes: z.string().trim().max(CARD_LINE_MAX),
  price: z.string().trim().max(CARD_LINE_MAX),
  leadTime: z.string().trim().max(CARD_LINE_MAX),
  photoIds: z.array(z.uuid()).max(CARD_PHOTOS_MAX),
  showsChips: z.boolean(),
})
export type CardDraft = z.output<typeof CardDraft>

/** What a card keeps: its words, and copies of the few facts of the scheme that a customer may see. */
export const CardContent = CardDraft.extend({
  blank: z.string(),
  chips: z.array(CardChip).max(CARD_CHIPS_MAX),
})
export type CardContent = z.output<typeof CardContent>

/** Whether a customer can see a card, or could once. */
export const CardState = z.enum(['not shared', 'shared', 'revoked'])
export type CardState = z.output<typeof CardState>

/** A card as the workshop sees it. */
export const CardView = CardContent.extend({
  id: z.uuid(),
  /** The workshop's name as it is today. */
  workshop: z.string(),
  schemeId: z.uuid(),
  schemeName: z.string(),
  version: z.number().int(),
  state: CardState,
  /** The public address while it is shared. */
  link: z.string().nullable(),
  sharedAt: z.iso.datetime().nullable(),
  revokedAt: z.iso.datetime().nullable(),
  createdAt: z.iso.datetime(),
})
export type CardView = z.output<typeof CardView>

/** A photo on a public card: an address below the card's own, its size and its words. */
export const PublicPhoto = z.strictObject({ id: z.uuid(), width: z.number().int(), height: z.number().int(), alt: z.string() })
export type PublicPhoto = z.output<typeof PublicPhoto>

/** Everything a public card may ever say; the one allow-list. Strict, so that nothing else can ride along. */
export const PublicCard = z.strictObject({
  workshop: z.string(),
  title: z.string(),
  words: z.string(),
  fish: z.string(),
  blank: z.string(),
  sizes: z.string(),
  price: z.string(),
  leadTime: z.string(),
  chips: z.array(z.strictObject(CardChip.shape)),
  photos: z.array(PublicPhoto),
})
export type PublicCard = z.output<typeof PublicCard>

/** What a link opens: the card, and where it stands, for the previews other people's programs draw of it. */
export const CardByLink = z.strictObject({ address: z.url(), card: PublicCard })
export type CardByLink = z.output<typeof CardByLink>
