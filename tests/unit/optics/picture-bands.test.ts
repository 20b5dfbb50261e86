import fc from 'fast-check'
import { expect, it } from 'vitest'
import { labFromReflectance, labFromXyz, type Xyz } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { filmOptics } from '../../../shared/optics/paint-optics'
import { coatLayer, layOver } from '../../../shared/optics/coat-layer'
import { spectrumFromLab } from '../../../shared/optics/spectrum-from-colour'
import { toPictureBands } from '../../../shared/optics/to-picture-bands'
import { xyzFromLinearRgb } from '../../../shared/optics/screen-colour'
import { LIGHTS } from '../../../shared/optics/lights'
import { pictureLinearWeights, pictureXyzWeights } from '../../../shared/optics/picture-weights'
import { measuredSpectrum } from '../../../shared/optics/surface'
import { flat, linearRgb, magnitude } from './draws'

const sum = (weights: Readonly<Float64Array>, row: number, values: ArrayLike<number>) =>
  Array.from(values).reduce((total, value, i) => total + weights[row * 16 + i]! * value, 0)

it.each(LIGHTS)('shows stacks of coats under %s as the exact bands do, nearly always closer than an eye can tell', (light) => {
  const weights = pictureXyzWeights(light)
  const misses: number[] = []
  const coat = fc.tuple(linearRgb, magnitude(-1, 0.7), magnitude(-1, 0.5))
  fc.assert(fc.property(fc.array(coat, { minLength: 1, maxLength: 4 }), (coats) => {
    let exact: Float64Array = flat(0.85), picture = new Float64Array(16).fill(0.85) as Float64Array
    for (const [rgb, S, X] of coats) {
      const masstone = spectrumFromLab(labFromXyz(xyzFromLinearRgb(rgb.map(c => 0.01 + 0.9 * c) as [number, number, number]))).reflectance
      const optics = filmOptics(masstone.map(R => S * (1 - R) ** 2 / 2 / R), flat(S))
      exact = layOver(coatLayer(optics, X), exact)
      picture = layOver(coatLayer(optics, X, 'picture16'), picture)
    }
    const seen = measuredSpectrum(picture, 'gloss')
    const xyz = [0, 1, 2].map(row => sum(weights, row, seen)) as Xyz
    misses.push(deltaE2000(labFromXyz(xyz, light), labFromReflectance(measuredSpectrum(exact, 'gloss'), light)))
  }), { numRuns: 200 })
  misses.sort((a, b) => a - b)
  expect(misses[100]).toBeLessThan(0.15)
  expect(misses[190]).toBeLessThan(0.6)
  expect(misses[199]).toBeLessThan(light.startsWith('LED') ? 2.5 : 1.5)
})
it.each(LIGHTS)('shows a white under %s as white to an eye used to it', (light) => {
  const weights = pictureLinearWeights(light)
  for (const row of [0, 1, 2]) expect(sum(weights, row, new Float64Array(16).fill(1))).toBeCloseTo(1, 6)
})
it('reads a straight spectrum straight', () => {
  const read = toPictureBands(Array.from({ length: 36 }, (_, i) => 380 + 10 * i))
  expect(Array.from(read).map(Math.round)).toEqual([415, 435, 450, 470, 485, 505, 525, 545, 565, 585, 600, 615, 635, 655, 680, 705])
})
it('refuses spectra that are not exact ones', () => {
  expect(() => toPictureBands(new Float64Array(16))).toThrow(RangeError)
})
