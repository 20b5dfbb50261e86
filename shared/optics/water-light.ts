import { type Water, waterAttenuation } from './water'

/**
 * How much faster an image dies away on its way to the eye than daylight does on its way down. An assumption, to be shown where
 * it is used: 1.5.
 */
export const PATH_FACTOR = 1.5
/** An eye makes up for a poor light by so much in each of its three channels, not more. Our judgement. */
export const ADAPTATION_MOST = 6

/** Where a lure swims, and from how far it is seen; m. */
export interface WaterPlace {
  water: Water
  depth: number
  distance: number
  /** `PATH_FACTOR` when left out. */
  pathFactor?: number
}

/** Shares of light that water leaves, 36 bands each. */
export interface WaterShares {
  /** Of the daylight, what comes down to the lure. */
  down: Float64Array
  /** Of the lure's light, what comes to the eye. */
  path: Float64Array
}

/**
 * What a water leaves of light: exp(−Kd·depth) on its way down, exp(−Kd·c·distance) on its way to the eye.
 *
 * The veil of light that the water itself adds between lure and eye is left out.
 *
 * @throws {RangeError} when depth or distance is negative or not finite
 */
export function waterShares({ water, depth, distance, pathFactor = PATH_FACTOR }: WaterPlace): WaterShares {
  for (const [what, value] of [['depth', depth], ['distance', distance], ['the path factor', pathFactor]] as const) {
    if (!(value >= 0 && value < Infinity)) throw new RangeError(`water: ${what} must be at least 0 m, got ${value}`)
  }
  const attenuation = waterAttenuation(water)
  return { down: attenuation.map(k => Math.exp(-k * depth)), path: attenuation.map(k => Math.exp(-k * pathFactor * distance)) }
}
