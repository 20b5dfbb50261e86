import type { Joint } from './blank-shape'

/** What a place in the side view is to the nearest joint. */
export interface JointPlace {
  /** mm from the edge of the gap; negative inside it, Infinity where no joint is near. */
  distance: number
  /** Radius of the rounded edge, mm. */
  round: number
  /** Unit direction toward the gap in the side view. */
  towardX: number
  towardY: number
}

/** Finds the joint that a place (x, y) mm belongs to. */
export function jointPlace(joints: readonly Joint[], x: number, y: number, out: JointPlace): void {
  out.distance = Infinity
  for (let i = 0; i < joints.length; i++) {
    const joint = joints[i] as Joint // i runs over the list
    const across = x - (joint.x + y * (joint.lean + joint.bow * y))
    const slope = joint.lean + 2 * joint.bow * y
    const steep = 1 / Math.sqrt(1 + slope * slope)
    const distance = Math.abs(across) * steep - joint.gap / 2
    if (distance < out.distance) {
      out.distance = distance
      out.round = joint.round
      const way = across > 0 ? -1 : 1
      out.towardX = way * steep
      out.towardY = -way * slope * steep
    }
  }
}

const NOTCH = 0.35
const DIP = 0.8

/** How far the outline draws in beside a joint, mm; inside the gap it is notched deeper, so that it is seen to be cut through. */
export function jointDip(place: JointPlace): number {
  if (place.distance >= place.round) return 0
  if (place.distance < 0) return (DIP + NOTCH) * place.round
  const s = 1 - place.distance / place.round
  return DIP * place.round * (1 - Math.sqrt(1 - s * s))
}

/** The walls of a gap stand across the body: how far they tilt the normal. */
const WALL_TILT = 2.4
/** Light deep in a gap and at its edges, against the gap's own, and how deep light reaches, mm. Chosen by eye. */
const GAP = { deep: 0.2, edge: 0.9, reach: 0.16 }

/** Tilt of the normal toward the gap on the rounded edge and on the walls inside; 0 away from it. */
export function jointTilt(place: JointPlace): number {
  if (place.distance >= place.round) return 0
  if (place.distance < 0) return WALL_TILT
  const s = Math.min(0.96, 1 - place.distance / place.round)
  return s / Math.sqrt(1 - s * s)
}

/** Light that still reaches the walls of a gap: most at its edges, so that it ends softly and not like a drawn line. */
export function gapLight(place: JointPlace): number {
  return GAP.deep + (GAP.edge - GAP.deep) * Math.exp(Math.min(0, place.distance) / GAP.reach)
}

/** Share of the light from all round that the gap takes away beside it. */
export function jointShade(place: JointPlace): number {
  return place.distance < place.round ? 0.55 * Math.exp(-Math.max(0, place.distance) / (0.22 * place.round)) : 0
}
