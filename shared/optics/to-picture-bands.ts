import { assertBands, BANDS_16, BANDS_36, type Spectrum } from './bands'
import optimised from './data/optimised-bands.json'
import { LINEAR_SRGB_FROM_XYZ } from './screen-colour'

/**
 * Reads a spectrum of 36 bands (K, S or a reflectance) at the 16 bands of pictures, on the straight line between neighbours.
 *
 * @throws {RangeError} when there are not 36 bands
 */
export function toPictureBands(exact: Spectrum, out: Float64Array = new Float64Array(16)): Float64Array {
  assertBands('toPictureBands', BANDS_36.length, exact)
  for (let i = 0; i < 16; i++) {
    const place = (BANDS_16[i]! - 380) / 10
    const below = Math.floor(place)
    out[i] = exact[below]! + (place - below) * (exact[below + 1]! - exact[below]!)
  }
  return out
}

/** How many exact bands each picture band stands for: 36 in all. A sum over exact bands is about one over picture bands with these. */
export const PICTURE_BAND_WIDTHS: Readonly<Float64Array> = shareExactBands(new Float64Array(36).fill(1))

/** Gives what lies in each of 36 bands to the picture bands beside it, by nearness, the outermost taking all beyond them; nothing is lost. */
export function shareExactBands(exact: Spectrum): Float64Array {
  assertBands('shareExactBands', BANDS_36.length, exact)
  const out = new Float64Array(16)
  BANDS_36.forEach((nm, i) => {
    const next = BANDS_16.findIndex(node => node > nm)
    if (next < 0) out[15]! += exact[i]!
    else if (next === 0) out[0]! += exact[i]!
    else {
      const low = BANDS_16[next - 1]!, share = (nm - low) / (BANDS_16[next]! - low)
      out[next - 1]! += (1 - share) * exact[i]!
      out[next]! += share * exact[i]!
    }
  })
  return out
}

/** Counts in the 36 bands as densities at the 16, per 10 nm: nothing is lost, lines included. */
export function perTen(exact: Spectrum): Float64Array {
  return shareExactBands(exact).map((value, b) => value / PICTURE_BAND_WIDTHS[b]!)
}

/** X, Y and Z of each picture band under D65: 16 weights for X, then for Y, then for Z. */
export const PICTURE_XYZ_WEIGHTS: Readonly<Float64Array> = Float64Array.from([...optimised.x, ...optimised.y, ...optimised.z])

/**
 * Linear sRGB of each picture band under D65: 16 weights for red, then green, then blue. A white of 1 in every band is 1, 1, 1.
 */
export const PICTURE_LINEAR_WEIGHTS: Readonly<Float64Array> = linearWeights()

function linearWeights(): Float64Array {
  const weights = new Float64Array(48)
  for (let channel = 0; channel < 3; channel++) {
    for (let band = 0; band < 16; band++) {
      for (let c = 0; c < 3; c++) {
        weights[channel * 16 + band]! += LINEAR_SRGB_FROM_XYZ[channel * 3 + c]! * PICTURE_XYZ_WEIGHTS[c * 16 + band]!
      }
    }
  }
  return weights
}
