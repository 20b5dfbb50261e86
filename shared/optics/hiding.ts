import { xyzFromReflectance } from './colorimetry'
import { HIDING_CONTRAST, HIDING_WHITE } from './known-film'
import type { PaintOptics } from './paint-optics'
import { stackReflectance } from './stack'
import { internalFromMeasured } from './surface'

/** Most passes that hiding is looked for in. */
const PASSES_MOST = 200

/**
 * Luminance over black as a share of luminance over white, for a number of passes; 1 hides wholly.
 *
 * @source contrast ratio of ISO 6504-3 and ASTM D2805 (from memory): white ground of luminance 0.80, gloss, D65
 */
export function contrastRatio(optics: PaintOptics, passes: number): number {
  const over = (ground: number) => {
    const stack = { ground: new Float64Array(36).fill(ground), coats: [{ optics, passes }], finish: 'gloss' as const }
    return xyzFromReflectance(stackReflectance(stack).measured)[1]
  }
  const white = over(internalFromMeasured(HIDING_WHITE, 'gloss'))
  // Black over both grounds: it hides, though it sends nothing back to compare.
  return white < 1e-9 ? 1 : over(0) / white
}

/** Passes a paint needs to hide, to within a hundredth; undefined for paints that will not (candies, pearls, clears). */
export function passesToHide(optics: PaintOptics): number | undefined {
  if (contrastRatio(optics, PASSES_MOST) < HIDING_CONTRAST) return undefined
  let low = 0, high = PASSES_MOST
  while (high - low > 0.005) {
    const middle = (low + high) / 2
    if (contrastRatio(optics, middle) < HIDING_CONTRAST) low = middle
    else high = middle
  }
  return (low + high) / 2
}

/**
 * Passes until the wanted share is covered, when each pass covers the same share of what is still bare; round up to spray.
 *
 * @param perPass above 0 and below 1
 * @param wanted  from 0 to below 1
 */
export function passesToCover(perPass: number, wanted: number = HIDING_CONTRAST): number {
  if (!(perPass > 0 && perPass < 1)) throw new RangeError(`passesToCover: the share a pass covers must be between 0 and 1, got ${perPass}`)
  if (!(wanted >= 0 && wanted < 1)) throw new RangeError(`passesToCover: the wanted share must be from 0 to below 1, got ${wanted}`)
  return Math.log(1 - wanted) / Math.log(1 - perPass)
}
