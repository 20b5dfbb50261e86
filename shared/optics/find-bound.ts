import type { Lab, Xyz } from './colorimetry'

/** Where X, Y and Z of some films lie at most, as middles and half widths: Y, X/Xn − Y, and Y − Z/Zn of a white with Y = 1. */
export interface ColourRange { y: number, yHalf: number, u: number, uHalf: number, v: number, vHalf: number }

/** Most that the rotation of CIEDE2000's chroma plane may take off a distance, as a share of RC/2: sin 60°. */
const TURNED = Math.sqrt(3) / 2
const BEND = 25 ** 7
const EPSILON = 216 / 24389
const SLOPE = 24389 / 27 / 116

/** Weights of the three sums a range is made of: Y, X/Xn − Y and Y − Z/Zn. */
export interface RangeWeights { y: Float64Array, u: Float64Array, v: Float64Array }

/** Weights of a light as a range needs them. */
export function rangeWeights({ x, y, z, white }: { x: Float64Array, y: Float64Array, z: Float64Array, white: Xyz }): RangeWeights {
  return { y, u: x.map((value, i) => value / white[0] - y[i]!), v: y.map((value, i) => value - z[i]! / white[2]) }
}

/** L*, a*, b* of the three sums. */
export function labFromSums(y: number, u: number, v: number): Lab {
  const fy = squash(y)
  return [116 * fy - 16, 500 * (squash(y + u) - fy), 200 * (fy - squash(y - v))]
}

/** What a range of colours is to a target. */
export interface RangeBound {
  /** No colour in the range is nearer than this, CIEDE2000. Not worked out further once it is past `enough`. */
  least: (range: ColourRange, enough: number) => number
}

/**
 * A lower bound of CIEDE2000 from a target to every colour of a range.
 *
 * The cube root is concave, so f(y + u) − f(y) is greatest at one end of y: that gives a* and b* their true limits. The
 * formula's weights are taken where they are greatest in the range, its stretch of a* (1 to 1.5) as 1 in distances and
 * as 1.5 in chromas, its mean square of chroma and hue terms as the least value of their quadratic form.
 */
export function rangeBound(target: Lab): RangeBound {
  const [L0, a0, b0] = target
  const chroma0 = Math.hypot(1.5 * a0, b0)
  const heavy0 = lightnessWeight(L0)

  return {
    least({ y, yHalf, u, uHalf, v, vHalf }, enough) {
      const low = Math.max(0, y - yHalf), high = Math.max(low, y + yHalf)
      const fLow = squash(low), fHigh = squash(high)
      const L1 = 116 * fLow - 16, L2 = 116 * fHigh - 16
      const dL = away(L0, L1, L2) / Math.max(heavy0, lightnessWeight((L0 + L1) / 2), lightnessWeight((L0 + L2) / 2))
      if (dL * CAREFUL >= enough) return dL * CAREFUL
      const uHigh = u + uHalf, uLow = u - uHalf, vHigh = v + vHalf, vLow = v - vHalf
      const aHigh = 500 * (uHigh > 0 ? squash(low + uHigh) - fLow : squash(high + uHigh) - fHigh)
      const aLow = 500 * (uLow > 0 ? squash(high + uLow) - fHigh : squash(low + uLow) - fLow)
      const bHigh = 200 * (vHigh > 0 ? fLow - squash(low - vHigh) : fHigh - squash(high - vHigh))
      const bLow = 200 * (vLow > 0 ? fHigh - squash(high - vLow) : fLow - squash(low - vLow))
      const da = away(a0, aLow, aHigh), db = away(b0, bLow, bHigh)
      const chroma = (chroma0 + Math.hypot(1.5 * Math.max(Math.abs(aLow), Math.abs(aHigh)), Math.max(Math.abs(bLow), Math.abs(bHigh)))) / 2
      // Hues from 0 to 180 degrees lie far from 275, where the rotation is.
      const isUnturned = b0 >= 0 && bLow >= 0
      const c7 = chroma ** 7
      const kept = isUnturned ? 1 : 1 - TURNED * Math.sqrt(c7 / (c7 + BEND))
      const weight = 1 + 0.045 * chroma
      return Math.sqrt(dL * dL + kept * (da * da + db * db) / (weight * weight)) * CAREFUL
    },
  }
}

/** Takes off what rounding, and the rotation that is not quite 0 above 180 degrees, could add. */
const CAREFUL = 0.9999

/** How far a value lies outside two others. */
function away(value: number, low: number, high: number): number {
  return value < low ? low - value : value > high ? value - high : 0
}

function lightnessWeight(L: number): number {
  const lift = (L - 50) ** 2
  return 1 + 0.015 * lift / Math.sqrt(20 + lift)
}

/** The cube root that CIELAB bends straight near black. */
function squash(t: number): number {
  return t > EPSILON ? Math.cbrt(t) : SLOPE * t + 16 / 116
}
