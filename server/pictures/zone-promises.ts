import type { Look } from '#shared/picture/look'
import { zoneBench, type ZoneBench } from '#shared/picture/zone-bench'
import { zoneColours } from '#shared/picture/zone-colours'
import type { Lab } from '#shared/shelf/paint'

/** The promised colour of a zone: CIELAB (D65), seen straight on, lit from 45°. */
export interface ZonePromise { zone: string, label: string, lab: Lab }

let bench: ZoneBench | undefined

/** Works out what a finished look promises, zone by zone. The thread keeps its bench: schemes of one workshop share blanks and paints. */
export default function zonePromises(look: Look): ZonePromise[] {
  bench ??= zoneBench()
  return zoneColours(look, { upTo: 'all', clear: true, light: 'bench' }, bench).map(({ zone, label, promised: { lab } }) => ({ zone, label, lab: [lab[0], lab[1], lab[2]] }))
}
