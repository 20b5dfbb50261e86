import fc from 'fast-check'
import { expect, it } from 'vitest'
import { lightnessOf } from '../../../shared/optics/colorimetry'
import { AIR_SURFACE, FINISHES, internalFromMeasured, internalSpectrum, measuredFromInternal, WATER_SURFACE } from '../../../shared/optics/surface'
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

/** Share of diffuse light that a flat boundary sends back, from Fresnel's equations: the mean over cos². */
function diffuseFresnel(from: number, to: number): number {
  const steps = 20_000
  let sum = 0
  for (let i = 0; i < steps; i++) {
    const sin2 = (i + 0.5) / steps
    const cos = Math.sqrt(1 - sin2), inside = (from / to) ** 2 * sin2
    if (inside >= 1) sum += 1
    else {
      const through = Math.sqrt(1 - inside)
      const s = ((from * cos - to * through) / (from * cos + to * through)) ** 2, p = ((to * cos - from * through) / (to * cos + from * through)) ** 2
      sum += (s + p) / 2
    }
  }
  return sum / steps
}

// J. L. Saunderson (1942): .04 and .60 for an index of 1.5; the same equations for a film in water.
it.each([['air', AIR_SURFACE, 1], ['water', WATER_SURFACE, 1.333]] as const)('loses at a film’s surface in %s what Fresnel’s equations say', (_, surface, outside) => {
  expect(surface.outside).toBeCloseTo(((1.5 - outside) / (1.5 + outside)) ** 2, 4)
  expect(surface.inside).toBeCloseTo(diffuseFresnel(1.5, outside), 2)
  expect(surface.index).toBeCloseTo(1.5 / outside, 12)
})
it('shows mid-tones lighter in water than in air, for less light is kept inside the film', () => {
  for (const R of [0.1, 0.3, 0.6]) expect(measuredFromInternal(R, 'gloss', WATER_SURFACE)).toBeGreaterThan(measuredFromInternal(R, 'gloss') + 0.02)
  expect(measuredFromInternal(0.02, 'matt', WATER_SURFACE)).toBeLessThan(measuredFromInternal(0.02, 'matt'))
})
