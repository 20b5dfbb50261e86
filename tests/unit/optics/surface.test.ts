import fc from 'fast-check'
import { expect, it } from 'vitest'
import { lightnessOf } from '../../../shared/optics/colorimetry'
import { FINISHES, internalFromMeasured, internalSpectrum, measuredFromInternal } from '../../../shared/optics/surface'
import { share } from './draws'

it('gives the start when the surface that was added is taken off', () => {
  fc.assert(fc.property(share, fc.constantFrom(...FINISHES), (R, finish) => {
    expect(internalFromMeasured(measuredFromInternal(R, finish), finish)).toBeCloseTo(R, 12)
  }))
})
// Lightness of matt and of gloss over the same inside; the finish is why a clear coat deepens dark colours and not pale ones.
it.each([[0.02, 26, 7], [0.1, 34, 24]])('deepens an inside reflectance of %d from L* %i matt to %i gloss', (R, matt, gloss) => {
  expect(lightnessOf(measuredFromInternal(R, 'matt'))).toBeCloseTo(matt, 0)
  expect(lightnessOf(measuredFromInternal(R, 'gloss'))).toBeCloseTo(gloss, 0)
})
it('shows a perfect white as 0.96 in gloss, the rest being the mirror image of the lamp', () => {
  expect(measuredFromInternal(1, 'gloss')).toBeCloseTo(0.96, 14)
})
it('orders matt, satin and gloss by their veil', () => {
  const [matt, satin, gloss] = FINISHES.map(finish => measuredFromInternal(0.05, finish))
  expect(matt! > satin! && satin! > gloss!).toBe(true)
})
it('takes a reading below its veil for black', () => {
  expect(internalSpectrum([0.01, 0.03], 'matt')).toEqual(Float64Array.of(0, 0))
})
