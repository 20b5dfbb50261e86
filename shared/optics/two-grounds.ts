import { assertBands, assertWithin, type Spectrum } from './bands'

/** Absorption and scattering of one pass, and whether the readings had to be bent to get them. */
export interface FoundCoefficients {
  /** Absorption per pass, ≥ 0. */
  K: Float64Array
  /** Scattering per pass, ≥ 0. */
  S: Float64Array
  /** True when the readings were not possible as they stood, or the coat hid so well that its strength is a guess. */
  clipped: boolean
}

/** Readings of the same film over a dark and a light ground, all inside the film (`surface.ts`), all 0…1. */
export interface TwoGrounds {
  black: Spectrum
  white: Spectrum
  overBlack: Spectrum
  overWhite: Spectrum
  /** Passes the film was sprayed in, > 0. */
  passes: number
}

/** Rounding is not a fault of the readings. */
const SLACK = 1e-9
const THINNEST = 1e-12

/**
 * Absorption and scattering of a paint from one film over two grounds.
 *
 * Ill-conditioned once the film nearly hides (contrast ratio above about 0.98): ask for a thinner swatch then.
 *
 * @throws {RangeError} when band counts differ, a reading is outside 0…1, the grounds are not one darker than the other,
 *                      or passes is not above 0
 * @accuracy K and S come back within 1e-8 from exact readings of films that do not hide
 * @source P. Kubelka (1948), as in `film.ts`, solved for K and S; written so that S = 0 and K = 0 need no branch
 */
export function coefficientsFromTwoGrounds({ black, white, overBlack, overWhite, passes }: TwoGrounds): FoundCoefficients {
  const count = black.length
  assertBands('twoGrounds', count, white, overBlack, overWhite)
  for (const reading of [black, white, overBlack, overWhite]) assertWithin('twoGrounds', 'a reading', 0, 1, reading)
  if (!(passes > 0 && passes < Infinity)) throw new RangeError(`twoGrounds: passes must be above 0, got ${passes}`)

  const K = new Float64Array(count), S = new Float64Array(count)
  let clipped = false
  for (let i = 0; i < count; i++) {
    const gb = black[i]!, gw = white[i]!, Rb = overBlack[i]!, Rw = overWhite[i]!
    if (!(gw > gb)) throw new RangeError(`twoGrounds: the white ground must be lighter than the black one in every band, got ${gw} and ${gb}`)

    let R = (gw * Rb - gb * Rw) / (gw - gb - gw * gb * (Rw - Rb))
    clipped ||= R < -SLACK || R > 1
    R = Math.min(1 - 1e-6, Math.max(0, R))
    let T2 = (Rw - R) * (1 - R * gw) / gw
    clipped ||= T2 < THINNEST
    T2 = Math.max(THINNEST, T2)
    clipped ||= R + Math.sqrt(T2) > 1 + SLACK
    const T = Math.min(1 - R, Math.sqrt(T2))

    const lost = (1 - R - T) * (1 - R + T) / 2
    const beta = Math.sqrt(lost * (lost + 2 * R))
    const u = beta / T < 1e-8 ? 1 / T : Math.asinh(beta / T) / beta
    S[i] = R * u / passes
    K[i] = lost * u / passes
  }
  return { K, S, clipped }
}
