import { verdictOn } from '#shared/optics/bass-eyes'
import { bassMapWords } from '#shared/optics/bass-words'
import type { ZoneName } from '#shared/blank/zone-names'
import type { ZoneColour } from '#shared/picture/zone-colours'

/** Zones that lie side by side on every blank. */
const NEIGHBOURS: readonly (readonly [ZoneName, ZoneName])[] = [
  ['back', 'upper-flank'], ['upper-flank', 'lower-flank'], ['lower-flank', 'belly'], ['head', 'gill-cover'], ['gill-cover', 'upper-flank'], ['tail', 'upper-flank'], ['back', 'belly'],
]

/** Which zones that lie side by side a largemouth bass's two cones would tell apart, in sentences; its back from its belly besides. */
export function coneSentences(zones: readonly Pick<ZoneColour, 'zone' | 'label' | 'cones'>[]): string[] {
  const by = new Map(zones.map(zone => [zone.zone, zone]))
  return bassMapWords(NEIGHBOURS.flatMap(([one, other]) => {
    const [a, b] = [by.get(one), by.get(other)]
    return a && b ? [{ names: [a.label.toLowerCase(), b.label.toLowerCase()] as const, by: verdictOn(a.cones, b.cones).by }] : []
  }))
}
