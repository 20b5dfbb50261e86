import { bassLight } from './bass-map'
import type { Rgb, Xyz } from './colorimetry'
import { fitPictureWeights } from './picture-weights'
import { linearFromXyz } from './screen-colour'
import { exactSeen } from './seen-exact'
import type { SeenWish } from './seen-wish'
import type { SurfaceLoss } from './surface'
import { perTen, PICTURE_XYZ_WEIGHTS } from './to-picture-bands'

export { DAYLIGHT_IN_AIR, seenKey } from './seen-key'
export type { SeenLamp, SeenWater, SeenWish } from './seen-wish'

/** What a picture is seen by, in the 16 bands of pictures. Water, lamps and what an eye is used to are all in these numbers. */
export interface SeenLight {
  key: string
  /** Linear sRGB of a radiance factor of 1 in each band: 16 for red, then green, then blue; under water far below 1 in sum. */
  reflected: Float64Array
  /** Photons that fall on the piece before its surface sends any back, per 10 nm. */
  photons: Float64Array
  /** Linear sRGB of a photon per 10 nm that leaves the piece: 16 for red, then green, then blue. */
  given: Float64Array
  /** Linear sRGB of a perfect white there: what is mirrored without colour, and a veil, are multiplied by this. 1, 1, 1 for lamps in air. */
  white: Rgb
  /** What the film ends against: a picture must reckon with these and not with air's, or mid-tones under water come out ten L* too dark. */
  surface: Readonly<SurfaceLoss>
}

/**
 * Works out what a picture is seen by. Takes about a millisecond: keep it by `seenKey`.
 *
 * @throws {RangeError} when the colour temperature, the depth or the distance is out of range
 * @accuracy against the 36 bands on random stacks, CIEDE2000: half within 0.2 and 95 in 100 within 0.6; light given off within 0.5
 */
export function seenLight(wish: SeenWish): SeenLight {
  if (wish.eye === 'bass') return bassLight(wish)
  const exact = exactSeen(wish)
  const toRgb = (xyz: Xyz) => linearFromXyz(exact.toDaylight(xyz))
  const photons = perTen(exact.photons)
  // Daylight's weights were fitted together with the bands themselves.
  const isDaylight = wish.light === 'D65' && !wish.water
  const reflected = inLinear(isDaylight ? PICTURE_XYZ_WEIGHTS : fitPictureWeights(exact.weights), toRgb)
  const given = isDaylight ? PICTURE_XYZ_WEIGHTS.map((weight, i) => weight / photons[i % 16]!) : fitPictureWeights(exact.given)
  return {
    key: exact.key, reflected, photons, given: inLinear(given, toRgb), surface: exact.surface,
    white: [0, 16, 32].map(from => reflected.subarray(from, from + 16).reduce((sum, weight) => sum + weight, 0)) as Rgb, // three of three
  }
}

/** Weights for X, Y and Z as weights for linear red, green and blue. */
function inLinear(xyz: Readonly<Float64Array>, toRgb: (xyz: Xyz) => Rgb): Float64Array {
  const answer = new Float64Array(48)
  for (let b = 0; b < 16; b++) toRgb([xyz[b]!, xyz[16 + b]!, xyz[32 + b]!]).forEach((value, channel) => answer[16 * channel + b] = value)
  return answer
}
