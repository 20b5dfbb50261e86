import type { Lab } from '#shared/shelf/paint'

/*
 * How far a colour must be off by CIEDE2000 when it is so far off in L*, a*, b*: what lets an index of straight distances answer
 * a question of CIEDE2000 without missing anything.
 *
 * Write D for the distance in a*, b* and y for that in L*. Stretching a* (by the same s, 1 to 1.5, for both colours) makes D no
 * shorter, and ΔC′² + ΔH′² is the square of the stretched distance x. With mean stretched chroma C at most C₁′ + x/2:
 *  - S_C = 1 + 0.045 C and S_H = 1 + 0.015 C T are no more than C and the hues that can be the middle one allow;
 *  - the turn R_T has a bound from the most chroma there can be and from how near the middle hue can come to 275°. However x is shared
 *    between chroma and hue, they come to at least x² times the lesser eigenvalue of [[p², −rpq/2], [−rpq/2, q²]] with p = 1/S_C,
 *    q = 1/S_H, r = |R_T|; it grows with p and q, since the inverse has positive entries only that fall with both;
 *  - the middle hue is off the wanted one by at most half the angle that x is seen under from the wanted colour;
 *  - S_L grows with how far the mean lightness is from 50, at most |L₁ − 50| + y/2, and y / S_L grows with y.
 * x / S_C and x / S_H grow with x. Taken over rings of D, each at its kindest ends, the least sum is a floor that no colour goes below.
 */

/** Width of a ring of chroma distance, and how far they go: no two colours of the index are farther apart. */
const RING = 0.5
const RINGS = 1200
const BEND = 25 ** 7
const RADIANS = Math.PI / 180

/** The least CIEDE2000 from `wanted` to any colour that is at least so far from it in L*, a*, b*. */
export type NearnessFloor = (distance: number) => number

/**
 * The floor under CIEDE2000 around a wanted colour. It never falls as the distance grows.
 *
 * @param wanted CIELAB
 * @accuracy never above the true least; about a tenth below it for greys, less than half of it only for strong blues
 */
export function nearnessFloor(wanted: Lab): NearnessFloor {
  const rings = Array.from({ length: RINGS }, (_, i) => chromaFloor(wanted, i * RING, (i + 1) * RING))
  return (distance) => {
    let least = Infinity
    rings.forEach((across, i) => {
      const inner = (i + 1) * RING
      const along = inner < distance ? lightnessFloor(wanted[0], Math.sqrt(distance ** 2 - inner ** 2)) : 0
      least = Math.min(least, across ** 2 + along ** 2)
    })
    return Math.sqrt(least)
  }
}

/** The least that a difference of lightness of at least `y` comes to. */
function lightnessFloor(lightness: number, y: number): number {
  const off = Math.abs(lightness - 50) + y / 2
  return y / (1 + 0.015 * off ** 2 / Math.sqrt(20 + off ** 2))
}

/** The least that chroma and hue come to when a* and b* are off by `from` to `to`. */
function chromaFloor([, a, b]: Lab, from: number, to: number): number {
  const chroma = Math.hypot(a, b)
  const least = stretch(chroma + to / 2), most = stretch(Math.max(0, chroma - to / 2))
  const own = Math.hypot(a * most, b)
  const farthest = to * most
  const middle = middleHues(a, b, least, most, farthest)
  const meanChroma = own + from / 2
  const p = 1 / (1 + 0.045 * meanChroma)
  const q = 1 / (1 + 0.015 * meanChroma * hueWeightAtMost(middle))
  const r = turnAtMost(Math.max(0, Math.abs(fromBlue(middle.hue)) - middle.off), own + farthest / 2)
  return from * Math.sqrt((p * p + q * q - Math.sqrt((p * p - q * q) ** 2 + (r * p * q) ** 2)) / 2)
}

function stretch(meanChroma: number): number {
  const c7 = meanChroma ** 7
  return 1.5 - 0.5 * Math.sqrt(c7 / (c7 + BEND))
}

/** Where the middle of two hues can lie: about a hue, off by at most so many degrees. */
interface MiddleHues { hue: number, off: number }

function middleHues(a: number, b: number, least: number, most: number, x: number): MiddleHues {
  const own = Math.hypot(a * least, b)
  if (x >= own) return { hue: 0, off: 180 }
  const [one, other] = [Math.atan2(b, a * least) / RADIANS, Math.atan2(b, a * most) / RADIANS]
  return { hue: (one + other) / 2, off: Math.abs(one - other) / 2 + Math.asin(x / own) / RADIANS / 2 }
}

/** Step at which hues are tried, degrees; T changes by at most 2.41 per radian, so by at most half a step's worth between two of them. */
const HUE_STEP = 4
const BETWEEN = 2.41 * HUE_STEP / 2 * RADIANS

function hueWeightAtMost({ hue, off }: MiddleHues): number {
  let most = 0
  for (let at = hue - off; at < hue + off + HUE_STEP; at += HUE_STEP) most = Math.max(most, hueWeight(at))
  return most + BETWEEN
}

function hueWeight(h: number): number {
  return 1 - 0.17 * Math.cos((h - 30) * RADIANS) + 0.24 * Math.cos(2 * h * RADIANS) + 0.32 * Math.cos((3 * h + 6) * RADIANS) - 0.20 * Math.cos((4 * h - 63) * RADIANS)
}

/** Degrees from 275°, −180…180. */
function fromBlue(hue: number): number {
  return ((hue - 275) % 360 + 540) % 360 - 180
}

function turnAtMost(gap: number, chroma: number): number {
  const c7 = chroma ** 7
  return 2 * Math.sqrt(c7 / (c7 + BEND)) * Math.sin(60 * Math.exp(-((gap / 25) ** 2)) * RADIANS)
}
