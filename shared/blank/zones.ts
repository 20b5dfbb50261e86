import type { Gill } from './blank-shape'
import type { PreparedBlank } from './prepared-blank'
import { halfGirth } from './surface-table'
import { PART_FIN, PART_NONE, type ViewSamples } from './view-sample-lists'
import { finOfZone, type BodyZone, type ZoneName } from './zone-names'

export { BODY_ZONES, finOfZone, finZone, ZONE_LABELS, ZONE_NAMES, type BodyZone, type ZoneName } from './zone-names'

/** Where the back ends and the belly begins, shares of the half girth from the back. */
export const BACK_EDGE = 0.235
export const BELLY_EDGE = 0.735
/** Length of the gill cover, share of the body. */
export const GILL_COVER_LENGTH = 0.11
/** Where the tail begins, share of the body. */
export const TAIL_START = 0.84
/** Distance given where a zone has no edge nearby, mm: on and off its fin, all over the body. */
export const FAR_MM = 1000

/** Back edge of the gill cover: share u of the length at share v of the half girth. Straight on above its top and below its bottom. */
export function gillEdge(gill: Gill, v: number): number {
  const k = Math.min(1, Math.max(0, (v - gill.top) / (gill.bottom - gill.top)))
  const arch = Math.sin(Math.PI * (0.06 + 0.9 * k))
  return gill.along - 0.088 * (1 - arch) + gill.bulge * arch * arch - 0.02 * k * k
}

function bodyZoneDistance(zone: BodyZone, gill: Gill, length: number, girth: number, u: number, v: number): number {
  switch (zone) {
    case 'body': return FAR_MM
    case 'back': return (BACK_EDGE - v) * girth
    case 'upper-flank': return Math.min(v - BACK_EDGE, 0.5 - v) * girth
    case 'lower-flank': return Math.min(v - 0.5, BELLY_EDGE - v) * girth
    case 'belly': return (v - BELLY_EDGE) * girth
    case 'top': return (0.5 - v) * girth
    case 'bottom': return (v - 0.5) * girth
    case 'head': return (gillEdge(gill, v) - u) * length
    case 'trunk': return (u - gillEdge(gill, v)) * length
    case 'gill-cover': {
      const behind = gillEdge(gill, v) - u
      return Math.min(
        Math.min(behind, GILL_COVER_LENGTH - behind) * length,
        Math.min(v - gill.top, gill.bottom - v) * girth,
      )
    }
    case 'tail': return (u - TAIL_START) * length
  }
}

/** How far inside a zone a place of the body lies: mm, + inside, - outside. Off every fin's zone. */
export function zoneDistance(blank: PreparedBlank, zone: ZoneName, u: number, v: number): number {
  if (finOfZone(zone) !== undefined) return -FAR_MM
  return bodyZoneDistance(zone as BodyZone, blank.shape.gill, blank.shape.length, halfGirth(blank.table, u), u, v)
}

/** `zoneDistance` for every sample of a view. Samples on a fin are far outside the zones of the body, and far inside the fin's own. */
export function fillZoneDistances(
  blank: PreparedBlank, zone: ZoneName, samples: ViewSamples, out: Float32Array = new Float32Array(samples.count),
): Float32Array {
  const fin = finOfZone(zone)
  const part = fin === undefined ? -1 : PART_FIN + blank.shape.fins.findIndex(one => one.id === fin)
  for (let i = 0; i < samples.count; i++) {
    const at = samples.part[i] ?? PART_NONE
    if (fin !== undefined) out[i] = at === part && part >= PART_FIN ? FAR_MM : -FAR_MM
    else out[i] = at >= PART_FIN ? -FAR_MM : zoneDistance(blank, zone, samples.u[i] ?? 0, samples.v[i] ?? 0)
  }
  return out
}
