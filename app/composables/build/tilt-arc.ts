import { toHundredth } from '#shared/blank/to-hundredth'
import { TILT_MAX, TILT_MIN } from '#shared/picture/picture-options'

/** The arc in the drawing's own px: centre, radius, and half the angle it spans, radians. */
const CENTRE = { x: 280, y: 918 }
const RADIUS = 900
const HALF = 0.2977

/** Names of the marks that carry figures, degrees. */
export const TILT_MARKS = [15, 45, 75, 110] as const
/** The small marks between them, degrees. */
export const TILT_TICKS = Array.from({ length: 20 }, (_, i) => TILT_MIN + 5 * i)

const turnOf = (tilt: number) => HALF * (2 * (tilt - TILT_MIN) / (TILT_MAX - TILT_MIN) - 1)

/** A point on the arc at a tilt, `inward` px below the line, and the turn of the lamp there, degrees. */
export function onArc(tilt: number, inward = 0): { x: number, y: number, turn: number } {
  const turn = turnOf(tilt)
  const r = RADIUS - inward
  return { x: toHundredth(CENTRE.x + r * Math.sin(turn)), y: toHundredth(CENTRE.y - r * Math.cos(turn)), turn: toHundredth(turn * 180 / Math.PI) }
}

/** The tilt nearest to a place of the drawing, whole degrees, held to the arc. */
export function tiltAt(x: number, y: number): number {
  const turn = Math.atan2(x - CENTRE.x, CENTRE.y - y)
  const tilt = TILT_MIN + (turn / HALF + 1) / 2 * (TILT_MAX - TILT_MIN)
  return Math.round(Math.min(TILT_MAX, Math.max(TILT_MIN, tilt)))
}

/** A tilt as a screen reader says it. */
export function tiltWords(tilt: number): string {
  const end = tilt <= 25 ? ', face' : tilt >= 100 ? ', flop' : tilt === 45 ? ', where the promise is read' : ''
  return `${tilt} degrees from gloss${end}`
}
