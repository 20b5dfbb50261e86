import type { CardChip } from './card'
import { zoneColours } from '#shared/picture/zone-colours'
import type { Look } from '#shared/picture/look'

/** Zones whose colours a customer is told, from the back down, and what they are called on a card. */
const TOLD = [['back', 'back'], ['upper-flank', 'shoulder'], ['lower-flank', 'flank'], ['belly', 'belly'], ['tail', 'tail']] as const

/** The colours of a finished lure as seen, in daylight, after the clear: where, what colour, in words. Nothing of the coats that make it. */
export function cardChips(look: Look): CardChip[] {
  const seen = new Map(zoneColours(look, { upTo: 'all', clear: true, light: 'bench' }).map(zone => [String(zone.zone), zone.promised]))
  return TOLD.flatMap(([zone, where]) => {
    const shown = seen.get(zone)
    return shown ? [{ where, colour: shown.hex, words: shown.words }] : []
  })
}
