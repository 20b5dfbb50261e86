import { expect, it } from 'vitest'
import { BANDS_36 } from '../../../shared/optics/bands'
import { freshWaterAttenuation, PURE_WATER } from '../../../shared/optics/fresh-water'
import { waterAttenuation } from '../../../shared/optics/water'

const at = (nm: number) => BANDS_36.indexOf(nm)

// R. M. Pope, E. S. Fry, Appl. Opt. 36 (1997): absorption 0.340, 0.0565 and 0.0092 1/m.
it.each([[650, 0.1827], [550, 0.7539], [450, 0.9549]])('five metres of pure water let through of %i nm the share %d', (nm, share) => {
  expect(Math.exp(-5 * PURE_WATER[at(nm)]!)).toBeCloseTo(share, 3)
})
it.each([[0.34, 13.54], [1, 4.61]])('at an attenuation of %d 1/m a hundredth is left at %d m', (k, depth) => {
  expect(Math.exp(-k * depth)).toBeCloseTo(0.01, 4)
  expect(Math.log(100) / k).toBeCloseTo(depth, 1)
})
// N. G. Jerlov, "Marine Optics" (1976), table XXVII, at nodes of the table.
it.each([['I', 450, 0.019], ['I', 650, 0.36], ['II', 500, 0.07], ['1C', 550, 0.12], ['5C', 500, 0.36], ['9C', 400, 2.4], ['9C', 700, 1.1]] as const)('type %s at %i nm takes %d per metre', (water, nm, k) => {
  expect(waterAttenuation(water)[at(nm)]).toBeCloseTo(k, 12)
})
it('is read on straight lines between the values of the table, and run on beyond them', () => {
  expect(waterAttenuation('1C')[at(440)]).toBeCloseTo(0.294, 12)
  expect(waterAttenuation('1C')[at(720)]).toBeCloseTo(0.762, 12)
  expect(waterAttenuation('1C')[at(380)]).toBeCloseTo(0.63, 12)
})
// What the names of our fresh waters are meant to be: 450, 550, 650 nm.
it.each([['clear', 0.25, 0.14, 0.45], ['green', 1.9, 0.67, 0.81], ['tea-stained', 6.2, 1.4, 0.74], ['muddy', 6.7, 2.8, 2.0]] as const)('fresh water, %s', (water, blue, green, red) => {
  const k = waterAttenuation(water)
  for (const [nm, expected] of [[450, blue], [550, green], [650, red]] as const) expect(k[at(nm)]! / expected).toBeGreaterThan(0.95)
  for (const [nm, expected] of [[450, blue], [550, green], [650, red]] as const) expect(k[at(nm)]! / expected).toBeLessThan(1.05)
})
// Pure water without particles: light on its way down is dimmed by absorption over its mean cosine, a little more for what is scattered.
it('is dimmed by nothing but water where nothing else is in it', () => {
  const k = freshWaterAttenuation({ dissolved: 0, slope: 0.015, silt: 0, algae: 0, scattering: 0, power: 1 })
  expect(k[at(650)]! / (PURE_WATER[at(650)]! / 0.9)).toBeCloseTo(1, 2)
})
