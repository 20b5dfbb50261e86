import { assertBands, type Spectrum } from './bands'
import { type Lab, labFromXyz, xyzFromReflectance } from './colorimetry'
import { glowPhotons, hasGlow } from './glow'
import { coatLayer } from './coat-layer'
import { fallingLight, radianceFactor } from './light-power'
import { adaptWithin } from './screen-colour'
import { type Stack, stackReflectance } from './stack'
import { WATER_SURFACE } from './surface'
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

/** Daylight under water, 36 bands each. */
export interface WaterLight {
  /** Share of the daylight that comes down to the lure. */
  down: Float64Array
  /** Share of the lure's light that comes to the eye. */
  path: Float64Array
  /** Power of the light that shows a white there, in the units of D65 at the surface. */
  power: Float64Array
}

/** A colour under water: as a camera set for daylight sees it, and to an eye used to the water as far as it can be. */
export interface WaterColour { lab: Lab, labAdapted: Lab }

/**
 * Light of a place under water: E·exp(−Kd·(depth + c·distance)), E being D65.
 *
 * The veil of light that the water itself adds between lure and eye is left out.
 *
 * @throws {RangeError} when depth or distance is negative or not finite
 */
export function waterLight({ water, depth, distance, pathFactor = PATH_FACTOR }: WaterPlace): WaterLight {
  for (const [what, value] of [['depth', depth], ['distance', distance], ['the path factor', pathFactor]] as const) {
    if (!(value >= 0 && value < Infinity)) throw new RangeError(`water: ${what} must be at least 0 m, got ${value}`)
  }
  const attenuation = waterAttenuation(water)
  const down = attenuation.map(k => Math.exp(-k * depth))
  const path = attenuation.map(k => Math.exp(-k * pathFactor * distance))
  return { down, path, power: fallingLight('D65').power.map((power, i) => power * down[i]! * path[i]!) }
}

/** Colour under water of a reflectance as measured, 36 bands. */
export function reflectanceUnderWater(reflectance: Spectrum, place: WaterPlace): WaterColour {
  assertBands('water', 36, reflectance)
  const { down, path } = waterLight(place)
  return colourUnderWater(Float64Array.from(reflectance), down, path)
}

/**
 * Colour of a stack under water, with what its fluorescents give off there: they turn what short light is left into light that
 * the way down had taken. Water bends light almost as paint does, so little is sent back at the surface, outside or inside.
 * Flakes are seen in diffuse light, from all sides.
 */
export function stackUnderWater(stack: Stack, place: WaterPlace): WaterColour {
  const { down, path } = waterLight(place)
  const { outside, inside } = WATER_SURFACE
  const { internal } = stackReflectance(stack)
  const seen = internal.map((R, i) => down[i]! * (1 - outside) * (1 - inside) * R / (1 - inside * R))
  if (hasGlow(stack.coats)) {
    const coats = stack.coats.map(coat => ({ ...coat, layer: coatLayer(coat.optics, coat.passes) }))
    const falling = fallingLight('D65').photons.map((photons, i) => photons * down[i]!)
    radianceFactor(glowPhotons(coats, stack.ground, falling, WATER_SURFACE), 'D65').forEach((value, i) => seen[i]! += value)
  }
  return colourUnderWater(seen, new Float64Array(36).fill(1), path, down)
}

/** @param white light that a perfect white would get there, when it is not in `light` */
function colourUnderWater(reflectance: Float64Array, light: Float64Array, path: Float64Array, white = light): WaterColour {
  const seen = xyzFromReflectance(reflectance.map((R, i) => R * light[i]! * path[i]!))
  const local = xyzFromReflectance(white.map((share, i) => share * path[i]!))
  return { lab: labFromXyz(seen), labAdapted: labFromXyz(adaptWithin(seen, local, ADAPTATION_MOST)) }
}
