/** The marks of the axis, in ΔE00: about 1 is barely seen, 3.5 and over would be redone (common practice). */
export const DISTANCE_MARKS = [1, 3.5, 8, 20] as const

/** The distance at the far end of the axis, in ΔE00; farther is drawn there too. */
const FAR_END = 24

/**
 * Where a colour distance lies on the axis, 0 to 1. The axis is a square root, since everything that matters lies near
 * its start. Throws RangeError for a negative distance or one that is no number.
 */
export function placeOnAxis(distance: number): number {
  if (!(distance >= 0)) throw new RangeError('A colour distance is not negative.')
  return Math.sqrt(Math.min(distance, FAR_END) / FAR_END)
}
