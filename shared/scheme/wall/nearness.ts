import type { Lab } from '#shared/shelf/paint'

/*
 * How far a colour must be off by CIEDE2000 when it is so far off in L*, a*, b*: what lets an index of straight distances answer
 * a question of CIEDE2000 without missing anything.
 *
 * Write D for the distance in a*, b* and y for that in L*. Stretching a* (by the same s, 1 to 1.5, for both colours) makes D no
 * shorter, and ΔC′² + ΔH′² is the square of the stretched distance x. With mean stretched chroma C at most C₁′ + x/2:
 *  - S_H ≤ S_C = 1 + 0.045 C, since 0.015 T ≤ 0.029, so the two terms come to at least (x / S_C)², which grows with x;
 *  - the turn R_T takes at most |R_T|/2 of that away, as 2|uv| ≤ u² + v²; its size has a bound from the most chroma there can be
 *    and from how near the mean hue can come to 275°: half the angle that x is seen under from the wanted colour;
 *  - S_L grows with how far the mean lightness is from 50, at most |L₁ − 50| + y/2, and y / S_L grows with y.
 * Taken over rings of D, each at its kindest ends, the least sum is a floor that no colour goes below.
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
 * @accuracy never above the true least; about a tenth below it for greys, a half for strong blues
 */
export function nearnessFloor(wanted: Lab): NearnessFloor {
  const rings = Array.from({ length: RINGS }, (_, i) => chromaFloor(wanted, i * RING, (i + 1) * RING))
  return (distance) => {
    let least = Infinity
    rings.forEach((across, i) => {
      const inner = (i + 1) * RING
      const along = inner < distance ? lightnessFloor(wanted[0], Math.sqrt(distance ** 2 - inner ** 2)) : 0
      least = Math.min(least, Math.hypot(across, along))
    })
    return least
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
  const x = from
  const farthest = to * most
  const SC = 1 + 0.045 * (own + x / 2)
  const turn = turnAtMost({ gap: hueGap(a, b, least, most, Math.hypot(a * least, b), farthest), chroma: own + farthest / 2 })
  return x / SC * Math.sqrt(1 - turn / 2)
}

function stretch(meanChroma: number): number {
  const c7 = meanChroma ** 7
  return 1.5 - 0.5 * Math.sqrt(c7 / (c7 + BEND))
}

/** How near to 275° the middle of the two hues can come, degrees. */
function hueGap(a: number, b: number, least: number, most: number, own: number, x: number): number {
  if (x >= own) return 0
  const gaps = [least, most].map(s => fromBlue(Math.atan2(b, a * s) / RADIANS))
  const isAcross = gaps[0]! * gaps[1]! < 0
  const gap = isAcross ? 0 : Math.min(...gaps.map(Math.abs))
  return Math.max(0, gap - Math.asin(x / own) / RADIANS / 2)
}

/** Degrees from 275°, −180…180. */
function fromBlue(hue: number): number {
  return ((hue - 275) % 360 + 540) % 360 - 180
}

function turnAtMost({ gap, chroma }: { gap: number, chroma: number }): number {
  const c7 = chroma ** 7
  return 2 * Math.sqrt(c7 / (c7 + BEND)) * Math.sin(60 * Math.exp(-((gap / 25) ** 2)) * RADIANS)
}
