import { fallingLight } from '#shared/optics/light-power'
import { AIR_SURFACE, type SurfaceLoss } from '#shared/optics/surface'
import { PICTURE_BAND_WIDTHS, PICTURE_LINEAR_WEIGHTS, shareExactBands } from '#shared/optics/to-picture-bands'

/** All that an engine needs to know of the light a piece is seen by: 16 bands, whatever lamp, water and eye it came from. */
export interface SeenLight {
  /** Says all of it. */
  key: string
  /** Linear sRGB of a radiance factor of 1 in each band: 16 for red, then green, then blue. */
  reflected: Readonly<Float64Array>
  /** Photons that fall on the piece, per 10 nm, in each band. */
  photons: Readonly<Float64Array>
  /** Linear sRGB of a photon per 10 nm that leaves the piece: 16 for red, then green, then blue. */
  given: Readonly<Float64Array>
  /** What the surface loses outside, and sends back inside. */
  surface: Readonly<SurfaceLoss>
}

const photons = shareExactBands(fallingLight('D65').photons).map((all, b) => all / PICTURE_BAND_WIDTHS[b]!)

/** Daylight, seen in air. */
export const SEEN_DAYLIGHT: SeenLight = {
  key: 'D65',
  reflected: PICTURE_LINEAR_WEIGHTS,
  photons,
  given: PICTURE_LINEAR_WEIGHTS.map((weight, i) => weight / photons[i % 16]!),
  surface: AIR_SURFACE,
}
