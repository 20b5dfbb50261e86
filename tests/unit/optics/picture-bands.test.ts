import fc from 'fast-check'
import { expect, it } from 'vitest'
import { labFromXyz, type Xyz } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { filmOptics } from '../../../shared/optics/paint-optics'
import { coatLayer, layOver } from '../../../shared/optics/coat-layer'
import { labFromReflectance } from '../../../shared/optics/colorimetry'
import { spectrumFromLab } from '../../../shared/optics/spectrum-from-colour'
import { PICTURE_LINEAR_WEIGHTS, PICTURE_XYZ_WEIGHTS, toPictureBands } from '../../../shared/optics/to-picture-bands'
import { xyzFromLinearRgb } from '../../../shared/optics/screen-colour'
import { measuredSpectrum } from '../../../shared/optics/surface'
import { flat, linearRgb, magnitude } from './draws'

const sum = (weights: Readonly<Float64Array>, row: number, values: ArrayLike<number>) =>
  Array.from(values).reduce((total, value, i) => total + weights[row * 16 + i]! * value, 0)

it('shows a white as white', () => {
  for (const row of [0, 1, 2]) expect(sum(PICTURE_LINEAR_WEIGHTS, row, new Float64Array(16).fill(1))).toBeCloseTo(1, 6)
})
it('shows stacks of coats as the exact bands do, nearly always closer than an eye can tell', () => {
  const misses: number[] = []
  const coat = fc.tuple(linearRgb, magnitude(-1, 0.7), magnitude(-1, 0.5))
  fc.assert(fc.property(fc.array(coat, { minLength: 1, maxLength: 4 }), (coats) => {
    let exact = flat(0.85), picture = new Float64Array(16).fill(0.85)
    for (const [rgb, S, X] of coats) {
      const masstone = spectrumFromLab(labFromXyz(xyzFromLinearRgb(rgb.map(c => 0.01 + 0.9 * c) as [number, number, number]))).reflectance
      const optics = filmOptics(masstone.map(R => S * (1 - R) ** 2 / 2 / R), flat(S))
      exact = layOver(coatLayer(optics, X), exact) as Float64Array<ArrayBuffer>
      picture = layOver(coatLayer(optics, X, 'picture16'), picture) as Float64Array<ArrayBuffer>
    }
    const seen = measuredSpectrum(picture, 'gloss')
    const xyz = [0, 1, 2].map(row => sum(PICTURE_XYZ_WEIGHTS, row, seen)) as Xyz
    misses.push(deltaE2000(labFromXyz(xyz), labFromReflectance(measuredSpectrum(exact, 'gloss'))))
  }), { numRuns: 200 })
  misses.sort((a, b) => a - b)
  expect(misses[100]).toBeLessThan(0.1)
  expect(misses[190]).toBeLessThan(0.4)
  expect(misses[199]).toBeLessThan(1.5)
})
it('reads a straight spectrum straight', () => {
  const read = toPictureBands(Array.from({ length: 36 }, (_, i) => 380 + 10 * i))
  expect(Array.from(read).map(Math.round)).toEqual([415, 435, 450, 470, 485, 505, 525, 545, 565, 585, 600, 615, 635, 655, 680, 705])
})
it('refuses spectra that are not exact ones', () => {
  expect(() => toPictureBands(new Float64Array(16))).toThrow(RangeError)
})
