import { type Bands, wavelengthsOf } from './bands'
import { type CoatLayer, filmLayer } from './film'
import type { SingleFlake } from './flake'
import { flakeCoat } from './flake-coat'
import { meanFlake, meanFlakeInDiffuse } from './mean-flake'
import type { PaintOptics } from './paint-optics'
import { toPictureBands } from './to-picture-bands'

export { type CoatLayer, layOver, layOverFraction, overGround } from './film'

/**
 * One coat of a paint in diffuse light, ready to be laid over a ground.
 *
 * @param passes ≥ 0; need not be whole
 * @param bands  36 exact bands, or 16 for pictures
 * @throws {RangeError} when the paint's spectra or the passes are out of range
 */
export function coatLayer(paint: PaintOptics, passes: number, bands: Bands = 'exact36'): CoatLayer {
  const { K, S } = coefficientsIn(paint, bands)
  const film = filmLayer(K, S, passes)
  if (!paint.flake) return film
  return flakeCoat(meanFlakeInDiffuse(paint.flake, bands), paint.flake.flakesPerPass, K, S, passes)
}

/**
 * Reflectance and transmittance of a coat of flakes for light that meets the flakes at given angles.
 *
 * @param cosines of the angle between light and flake, in the binder
 * @returns one layer per cosine
 */
export function flakeCoatAt(paint: PaintOptics, passes: number, cosines: readonly number[], bands: Bands = 'exact36'): CoatLayer[] {
  if (!paint.flake) throw new RangeError('flakeCoatAt: the paint has no flakes')
  const { flakesPerPass } = paint.flake
  const { K, S } = coefficientsIn(paint, bands)
  const count = wavelengthsOf(bands).length
  const all = meanFlake(paint.flake, cosines, bands)
  return cosines.map((_, c) => {
    const one: SingleFlake = { R: all.R.subarray(c * count, (c + 1) * count), T: all.T.subarray(c * count, (c + 1) * count) }
    return flakeCoat(one, flakesPerPass, K, S, passes)
  })
}

/** K and S of a paint, per pass, in a set of bands. */
export function coefficientsIn(paint: PaintOptics, bands: Bands): { K: Float64Array, S: Float64Array } {
  return bands === 'exact36'
    ? { K: Float64Array.from(paint.K), S: Float64Array.from(paint.S) }
    : { K: toPictureBands(paint.K), S: toPictureBands(paint.S) }
}
