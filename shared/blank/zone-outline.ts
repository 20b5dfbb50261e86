import type { PreparedBlank } from './prepared-blank'
import { drawingPoint, type DrawingPoint } from './side-outline'
import { placeOnSurface } from './surface-coordinates'
import { BACK_EDGE, BELLY_EDGE, finOfZone, GILL_COVER_LENGTH, gillEdge, TAIL_START, type BodyZone, type ZoneName } from './zones'

const STEPS = 40

/** A way over the skin in shares: at f from 0 to 1, the place (u, v). */
type Way = (f: number) => readonly [u: number, v: number]

const between = (from: number, to: number, f: number) => from + (to - from) * f

/** A band between two girth shares, all along the body. */
function band(top: number, bottom: number): Way[] {
  return [f => [f, top], f => [between(1, 0, f), bottom]]
}

function ways(blank: PreparedBlank, zone: BodyZone): Way[] {
  const { gill } = blank.shape
  const edgeDown: Way = f => [gillEdge(gill, f), f]
  switch (zone) {
    case 'body': return band(0, 1)
    case 'back': return band(0, BACK_EDGE)
    case 'upper-flank': return band(BACK_EDGE, 0.5)
    case 'lower-flank': return band(0.5, BELLY_EDGE)
    case 'belly': return band(BELLY_EDGE, 1)
    case 'top': return band(0, 0.5)
    case 'bottom': return band(0.5, 1)
    case 'head': return [f => [gillEdge(gill, 0) * f, 0], edgeDown, f => [gillEdge(gill, 1) * (1 - f), 1]]
    case 'trunk': return [f => [between(gillEdge(gill, 0), 1, f), 0], f => [between(1, gillEdge(gill, 1), f), 1], f => edgeDown(1 - f)]
    case 'tail': return [f => [between(TAIL_START, 1, f), 0], f => [between(1, TAIL_START, f), 1], f => [TAIL_START, 1 - f]]
    case 'gill-cover': {
      const down: Way = f => edgeDown(between(gill.top, gill.bottom, f))
      return [down, (f) => {
        const [u, v] = down(1 - f)
        return [Math.max(0, u - GILL_COVER_LENGTH), v]
      }]
    }
  }
}

/** Closed outline of a zone in the side view, mm with y down, for hatching over `sideOutline`. Empty for a fin the blank does not have. */
export function zoneOutline(blank: PreparedBlank, zone: ZoneName): DrawingPoint[] {
  const fin = finOfZone(zone)
  if (fin !== undefined) {
    const outline = blank.fins.find(one => one.id === fin)
    return outline ? Array.from(outline.xs, (x, i) => drawingPoint(x, -(outline.ys[i] ?? 0))) : []
  }
  return ways(blank, zone as BodyZone).flatMap(way => // not a fin, so a zone of the body
    Array.from({ length: STEPS + 1 }, (_, i) => {
      const { position } = placeOnSurface(blank, ...way(i / STEPS), 1)
      return drawingPoint(position[0], -position[1])
    }))
}
