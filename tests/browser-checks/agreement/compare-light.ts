import { labFromXyz, type Rgb } from '#shared/optics/colorimetry'
import { deltaE2000 } from '#shared/optics/delta-e'
import { xyzFromLinearRgb } from '#shared/optics/screen-colour'

/** How far the light of some samples is from what it should be, CIEDE2000. */
export interface Difference { samples: number, most: number, mean: number }

/** Compares linear light, three numbers for each sample. What is no number at all is infinitely far. */
export function differenceOf(light: Float32Array, right: ArrayLike<number>): Difference {
  const samples = right.length / 3
  if (light.length !== right.length) return { samples, most: Infinity, mean: Infinity }
  let sum = 0, most = 0
  for (let i = 0; i < samples; i++) {
    const apart = deltaE2000(labAt(light, i), labAt(right, i))
    const counted = Number.isNaN(apart) ? Infinity : apart
    sum += counted
    if (counted > most) most = counted
  }
  return { samples, most, mean: sum / samples }
}

function labAt(light: ArrayLike<number>, i: number) {
  const rgb: Rgb = [light[3 * i]!, light[3 * i + 1]!, light[3 * i + 2]!]
  return labFromXyz(xyzFromLinearRgb(rgb))
}

/** Many comparisons as one. */
export function joined(all: readonly Difference[]): Difference {
  const samples = all.reduce((sum, each) => sum + each.samples, 0)
  return {
    samples,
    most: Math.max(...all.map(({ most }) => most)),
    mean: all.reduce((sum, each) => sum + each.mean * each.samples, 0) / samples,
  }
}
