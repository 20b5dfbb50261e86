import observer from './data/cie-1931-observer.json'
import a from './data/light-a.json'
import d65 from './data/light-d65.json'
import f11 from './data/light-f11.json'
import led3000 from './data/light-led-3000.json'
import led5000 from './data/light-led-5000.json'
import { BANDS_36 } from './bands'

/** The lights a colour can be seen under: daylight, a filament lamp, a shop tube, and two white lamps of the bench. */
export const LIGHTS = ['D65', 'A', 'F11', 'LED-5000', 'LED-3000'] as const

/** Name of a light. The two LED lights are our own approximations; the others are tables of the CIE. */
export type Light = typeof LIGHTS[number]

/** X, Y and Z; a perfect white has Y = 1. */
export type Xyz = [x: number, y: number, z: number]

/** What turns 36 reflectances into X, Y and Z under one light. */
export interface BandWeights {
  /** 36 weights each. */
  x: Float64Array
  y: Float64Array
  z: Float64Array
  /** X, Y and Z of the perfect diffuser: the sums of the weights, so that a grey is exactly grey. */
  white: Xyz
}

/** Relative power of a light every `step` nm from `first`: 380 to 780 nm by 5, as the observer's table. */
export interface PowerTable { first: number, step: number, power: readonly number[] }

/** Tables of power of the lights, as read. */
export const POWER: Readonly<Record<Light, PowerTable>> = { 'D65': d65, 'A': a, 'F11': f11, 'LED-5000': led5000, 'LED-3000': led3000 }

/** Tells whether a word names a light the engine knows. */
export function isLight(name: unknown): name is Light {
  return LIGHTS.some(light => light === name)
}

/** Relative power of a light at the 36 bands. For lights with lines, read `weightsFor` instead: it keeps the lines. */
export function powerAtBands(light: Light): Float64Array {
  const { power, first, step } = POWER[light]
  return Float64Array.from(BANDS_36, nm => power[(nm - first) / step]!)
}

/**
 * Weights of the 36 bands under a light given by its table.
 *
 * Each 5 nm sample of light times observer is shared between its two neighbouring bands in proportion to nearness, which is
 * the same as summing at 5 nm a reflectance joined by straight lines; samples past 730 nm go to the last band.
 *
 * @source ASTM E308 and CIE 015 for the sums; the sharing is linear interpolation
 */
export function bandWeightsOf({ power }: PowerTable): BandWeights {
  const sums = [observer.x, observer.y, observer.z].map((matching) => {
    const weights = new Float64Array(36)
    matching.forEach((value, i) => {
      const place = Math.min(i * observer.step / 10, 35)
      const below = Math.floor(place)
      const share = place - below
      weights[below]! += (1 - share) * value * power[i]!
      if (share > 0) weights[below + 1]! += share * value * power[i]!
    })
    return weights
  }) as [Float64Array, Float64Array, Float64Array]
  const scale = 1 / total(sums[1])
  for (const weights of sums) for (let i = 0; i < 36; i++) weights[i]! *= scale
  const [x, y, z] = sums
  return { x, y, z, white: [total(x), total(y), total(z)] }
}

function total(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0)
}

const WEIGHTS = Object.fromEntries(LIGHTS.map(light => [light, bandWeightsOf(POWER[light])])) as Record<Light, BandWeights>

/** Weights of the 36 bands under a light, and its white. Shared: not to be written to. */
export function weightsFor(light: Light): BandWeights {
  return WEIGHTS[light]
}
