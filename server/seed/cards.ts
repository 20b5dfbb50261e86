import type { PublishedDemo } from './finishes'
import type { Ctx } from '#server/services/ctx'
import { addCard } from '#server/services/cards/add-card'
import { changeCard } from '#server/services/cards/change-card'
import { shareCard } from '#server/services/cards/share-card'
import type { CardDraft, CardView } from '#shared/cards/card'

/** What the front desk wrote on the demo's two cards. */
export const CARD_WORDS: Readonly<Record<string, Pick<CardDraft, 'words' | 'price' | 'leadTime'>>> = {
  'Perch, evening water': {
    words: 'Late light on a reed edge: gold under the scales, bars that go soft at the foot, fins that catch the last of the sun. Looks like a perch that has been lying in the shade all day.',
    price: '38, with its box',
    leadTime: 'Made to order, about four weeks',
  },
  'Brook trout, October': {
    words: 'Spawning dress: worm tracks over the back, red spots in their blue rings, a belly like a maple leaf. Two joints, slow turn.',
    price: '64',
    leadTime: 'Two in stock, then six weeks',
  },
}

/** A card of a demo finish, written and shared. */
export async function shareDemoCard(desk: Ctx, { plan, schemeId }: PublishedDemo): Promise<CardView | null> {
  const written = CARD_WORDS[plan.name]
  if (!written) return null
  const card = await addCard(desk, schemeId)
  const { title, fish, sizes, photoIds, showsChips } = card
  const changed = await changeCard(desk, card.id, card.version, { title, fish, sizes, photoIds, showsChips, ...written })
  return shareCard(desk, changed.id)
}
