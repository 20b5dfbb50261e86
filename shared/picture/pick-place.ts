import { finZone, type BodyZone, type ZoneName } from '#shared/blank/zone-names'
import { BACK_EDGE, BELLY_EDGE, GILL_COVER_LENGTH, gillEdge, TAIL_START } from '#shared/blank/zones'
import type { BlankShape } from '#shared/blank/blank-shape'
import { PART_FIN, PART_NONE, type ViewSamples } from '#shared/blank/view-sample-lists'

/** A place on a blank that somebody pointed at in its picture. */
export interface PickedPlace {
  /** Zone round the girth, or the fin. */
  zone: ZoneName
  /** Zone along the body; absent on fins. */
  along?: BodyZone
  u: number
  v: number
  side: 1 | -1
}

/** What lies at a pixel of a view; undefined beside the blank. The body comes before the fins behind it. */
export function pickPlace(samples: ViewSamples, shape: BlankShape, x: number, y: number): PickedPlace | undefined {
  const wanted = Math.floor(y) * samples.view.width + Math.floor(x)
  if (x < 0 || y < 0 || x >= samples.view.width || y >= samples.view.height) return undefined
  const i = samples.pixel.indexOf(wanted)
  if (i < 0) return undefined
  const part = samples.part[i]!, u = samples.u[i]!, v = samples.v[i]!
  const side = samples.side[i]! < 0 ? -1 : 1
  if (part === PART_NONE) return undefined
  if (part >= PART_FIN) {
    const fin = shape.fins[part - PART_FIN]
    return fin && { zone: finZone(fin.id), u, v, side }
  }
  return { zone: girthZoneAt(v), along: lengthZoneAt(shape, u, v), u, v, side }
}

/** Zone round the girth at a share of the half girth from the back. */
export function girthZoneAt(v: number): BodyZone {
  if (v < BACK_EDGE) return 'back'
  if (v < 0.5) return 'upper-flank'
  return v < BELLY_EDGE ? 'lower-flank' : 'belly'
}

function lengthZoneAt({ gill }: BlankShape, u: number, v: number): BodyZone {
  const ahead = gillEdge(gill, v) - u
  if (ahead > 0) return ahead < GILL_COVER_LENGTH && v > gill.top && v < gill.bottom ? 'gill-cover' : 'head'
  return u > TAIL_START ? 'tail' : 'trunk'
}
