import { assertBands, type Spectrum } from './bands'
import { type Lab, labFromXyz, type Xyz } from './colorimetry'
import { fallingLight, weigh } from './light-power'
import { exactSeen, type ExactSeen } from './seen-exact'
import { promise, type Stack } from './stack'
import { type WaterPlace, type WaterShares, waterShares } from './water-light'

export { ADAPTATION_MOST, PATH_FACTOR, type WaterPlace } from './water-light'

/** Daylight under water, 36 bands each. */
export interface WaterLight extends WaterShares {
  /** Power of the light that shows a white there, in the units of D65 at the surface. */
  power: Float64Array
}

/** A colour under water: as a camera set for daylight sees it, and to an eye used to the water as far as it can be. */
export interface WaterColour { lab: Lab, labAdapted: Lab }

/**
 * Light of a place under water: E·exp(−Kd·(depth + c·distance)), E being D65.
 *
 * @throws {RangeError} when depth or distance is negative or not finite
 */
export function waterLight(place: WaterPlace): WaterLight {
  const { down, path } = waterShares(place)
  return { down, path, power: fallingLight('D65').power.map((power, i) => power * down[i]! * path[i]!) }
}

/** Colour under water of a reflectance as seen there, 36 bands: no surface is added or taken off. */
export function reflectanceUnderWater(reflectance: Spectrum, place: WaterPlace): WaterColour {
  assertBands('water', 36, reflectance)
  const seen = swimming(place)
  return bothWays(weigh(seen.weights, reflectance), seen)
}

/**
 * Colour of a stack under water, with what its fluorescents give off there: they turn what short light is left into light that
 * the way down had taken. Water bends light almost as paint does, so little is sent back at the surface, outside or inside.
 */
export function stackUnderWater(stack: Stack, place: WaterPlace): WaterColour {
  const seen = swimming(place)
  return bothWays(promise(stack, seen).xyz, seen)
}

function swimming({ water, depth, distance }: WaterPlace): ExactSeen {
  return exactSeen({ light: 'D65', water: { type: water, depth, distance, adapted: true } })
}

function bothWays(xyz: Xyz, { toDaylight }: ExactSeen): WaterColour {
  return { lab: labFromXyz(xyz), labAdapted: labFromXyz(toDaylight(xyz)) }
}
