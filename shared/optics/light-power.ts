import { BANDS_36 } from './bands'
import { type BandWeights, type Light, POWER, weightsFor, type Xyz } from './lights'

/** The light as it falls on a piece, and how light given off counts against it. */
export interface FallingLight {
  /** Power in each of the 36 bands, relative. */
  power: Float64Array
  /** Photons in each band, in units of `power` × nm. */
  photons: Float64Array
}

/**
 * Power of a light in each of the 36 bands, lines included: each 5 nm sample is shared between its two neighbouring bands as
 * in `weightsFor`, so that a line beside a band is not lost.
 */
export function fallingLight(light: Light): FallingLight {
  return FALLING[light]
}

function fall(light: Light): FallingLight {
  const { power, step } = POWER[light]
  const sums = new Float64Array(36), reach = new Float64Array(36)
  power.forEach((value, i) => {
    const place = i * step / 10
    if (place > 35) return
    const below = Math.floor(place), share = place - below
    sums[below]! += (1 - share) * value
    reach[below]! += 1 - share
    if (share > 0) {
      sums[below + 1]! += share * value
      reach[below + 1]! += share
    }
  })
  const mean = sums.map((value, i) => value / reach[i]!)
  return { power: mean, photons: mean.map((value, i) => value * BANDS_36[i]!) }
}

const FALLING = Object.fromEntries((Object.keys(POWER) as Light[]).map(light => [light, fall(light)])) as Record<Light, FallingLight>

/**
 * X, Y and Z of light given off, in the units of a reflectance's under the same light.
 *
 * @param photons 36 bands, in the units of `FallingLight.photons`
 */
export function xyzOfPhotons(photons: ArrayLike<number>, light: Light): Xyz {
  return sum(weightsFor(light), radianceFactor(photons, light))
}

/**
 * Light given off as a share of what a perfect white would send back in the same band; may be far above 1, and is a huge
 * number where the light has next to no power.
 */
export function radianceFactor(photons: ArrayLike<number>, light: Light): Float64Array {
  const falling = FALLING[light].photons
  return falling.map((value, i) => photons[i]! / value)
}

function sum({ x, y, z }: BandWeights, factor: Float64Array): Xyz {
  const answer: Xyz = [0, 0, 0]
  factor.forEach((value, i) => {
    answer[0] += x[i]! * value
    answer[1] += y[i]! * value
    answer[2] += z[i]! * value
  })
  return answer
}
