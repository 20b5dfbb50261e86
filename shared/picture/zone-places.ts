import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { PART_BODY, PART_FIN, type ViewSamples } from '#shared/blank/view-sample-lists'
import { finZone, ZONE_LABELS, type BodyZone, type ZoneName } from '#shared/blank/zone-names'
import { BACK_EDGE, BELLY_EDGE, GILL_COVER_LENGTH, gillEdge, TAIL_START } from '#shared/blank/zones'

/** A zone whose colour is promised, and the samples of a view that speak for it. */
export interface ZonePlace {
  zone: ZoneName
  label: string
  /** Places in the list of samples. */
  samples: Uint32Array
}

/** Room left to the neighbouring zones, as shares of the half girth and of the length: fades belong to neither. */
const INSET_ROUND = 0.045
const INSET_ALONG = 0.03

type Core = (u: number, v: number, ahead: number) => boolean

const onTrunk = (from: number, to: number): Core => (u, v, ahead) =>
  ahead < -INSET_ALONG && u < TAIL_START && v > from + INSET_ROUND && v < to - INSET_ROUND

/** Zones whose colour is promised, and where on the body each is judged, from back to belly and from nose to tail. */
const CORES: readonly (readonly [BodyZone, Core])[] = [
  ['back', onTrunk(-INSET_ROUND, BACK_EDGE)],
  ['upper-flank', onTrunk(BACK_EDGE, 0.5)],
  ['lower-flank', onTrunk(0.5, BELLY_EDGE)],
  ['belly', onTrunk(BELLY_EDGE, 1 + INSET_ROUND)],
  ['head', (_, v, ahead) => ahead > GILL_COVER_LENGTH && v > 0.2 && v < 0.75],
  ['gill-cover', (_, v, ahead) => ahead > INSET_ALONG && ahead < GILL_COVER_LENGTH - INSET_ALONG && v > 0.3 && v < 0.7],
  ['tail', (u, v) => u > TAIL_START + INSET_ALONG && v > 0.3 && v < 0.7],
]

/** The zones of a blank in a view of its flank; a zone that cannot be seen there is left out. */
export function zonePlaces(blank: PreparedBlank, samples: ViewSamples): ZonePlace[] {
  const { gill, fins } = blank.shape
  const found = CORES.map((): number[] => [])
  const onFins = fins.map((): number[] => [])
  for (let i = 0; i < samples.count; i++) {
    const part = samples.part[i]!, u = samples.u[i]!, v = samples.v[i]!
    if (part >= PART_FIN) {
      onFins[part - PART_FIN]?.push(i)
      continue
    }
    if (part !== PART_BODY) continue
    const ahead = gillEdge(gill, v) - u
    CORES.forEach(([, isIn], zone) => {
      if (isIn(u, v, ahead)) found[zone]!.push(i)
    })
  }
  return [
    ...CORES.map(([zone], i): ZonePlace => ({ zone, label: ZONE_LABELS[zone], samples: Uint32Array.from(found[i]!) })),
    ...fins.map(({ id }, i): ZonePlace => ({ zone: finZone(id), label: finLabel(id), samples: Uint32Array.from(onFins[i]!) })),
  ].filter(({ samples: places }) => places.length > 0)
}

function finLabel(id: string): string {
  const words = id.replaceAll('-', ' ')
  return /fin$/.test(words) || words === 'tail' ? `${words[0]!.toUpperCase()}${words.slice(1)}${words === 'tail' ? ' fin' : ''}` : `${words[0]!.toUpperCase()}${words.slice(1)} fin`
}
