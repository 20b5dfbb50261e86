import { toHundredth } from '#shared/blank/to-hundredth'

/** Depths that stand evenly spaced on the sounding line, m: the first metre changes most. */
export const DEPTH_MARKS = [0, 1, 2, 3, 5, 8, 12] as const
/** Deepest mark, m. */
export const DEPTH_MOST = DEPTH_MARKS[DEPTH_MARKS.length - 1]!

/** The line in the drawing's own px: where 0 m is, and from one mark to the next. */
const [TOP, SPACE] = [20, 38]
/** Where the drawing ends. */
export const LINE_END = TOP + SPACE * (DEPTH_MARKS.length - 1) + 14

/** Place of a depth on the line, px from the top of the drawing. */
export function onLine(depth: number): number {
  const held = Math.min(DEPTH_MOST, Math.max(0, depth))
  const below = Math.max(1, DEPTH_MARKS.findIndex(mark => mark >= held))
  const [from, to] = [DEPTH_MARKS[below - 1]!, DEPTH_MARKS[below]!]
  return toHundredth(TOP + SPACE * (below - 1 + (held - from) / (to - from)))
}

/** Depth at a place of the drawing, to the quarter of a metre, held to the line. */
export function depthAt(y: number): number {
  const place = Math.min(DEPTH_MARKS.length - 1, Math.max(0, (y - TOP) / SPACE))
  const below = Math.min(DEPTH_MARKS.length - 2, Math.floor(place))
  const [from, to] = [DEPTH_MARKS[below]!, DEPTH_MARKS[below + 1]!]
  return Math.round(4 * (from + (place - below) * (to - from))) / 4
}

/** A depth as a screen reader says it. */
export function depthWords(depth: number): string {
  return depth === 0 ? 'in air' : `${depth} ${depth === 1 ? 'metre' : 'metres'} down`
}
