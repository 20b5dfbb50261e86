import { expect, it } from 'vitest'
import { BANDS_36 } from '../../../shared/optics/bands'
import { bassCatch, coneSensitivity, toldApartByBass } from '../../../shared/optics/bass-eyes'
import type { Lab } from '../../../shared/optics/colorimetry'
import { spectrumFromLab } from '../../../shared/optics/spectrum-from-colour'
import { waterLight } from '../../../shared/optics/under-water'
import { flat } from './draws'

const of = (lab: Lab) => spectrumFromLab(lab).reflectance
const red = of([45, 60, 40]), green = of([50, -50, 35]), chartreuse = of([88, -22, 80]), white = of([94, 0, 2]), blue = of([28, 10, -42]), black = of([10, 0, 0])

// Mitchem et al., Current Zoology 65 (2019): bass told red and green from all else, and took chartreuse for white and blue for black.
it('has red and green told apart by colour', () => {
  expect(toldApartByBass(red, green).words).toMatch(/tell apart: these two, by colour/)
})
it.each([['chartreuse and white', chartreuse, white], ['blue and black', blue, black]])('does not have %s told apart by colour', (_, a, b) => {
  expect(toldApartByBass(a, b).words).toMatch(/not these two/)
  expect(toldApartByBass(a, b).hue).toBeLessThan(0.3 * toldApartByBass(red, green).hue)
})
it('has a colour not told from itself, in either order alike', () => {
  expect(toldApartByBass(red, red)).toMatchObject({ hue: 0, brightness: 0 })
  expect(toldApartByBass(red, green).hue).toBeCloseTo(toldApartByBass(green, red).hue, 9)
})
it('never says that a colour catches more', () => {
  for (const words of [toldApartByBass(red, green), toldApartByBass(white, black), toldApartByBass(red, red)].map(verdict => verdict.words)) {
    expect(words).toContain('two cones would tell apart')
    expect(words).not.toMatch(/catch|bite|strike|see/)
  }
})
it('has cones that peak where they were measured and take all of a white', () => {
  for (const peak of [535, 614]) {
    const cone = coneSensitivity(peak)
    expect(Math.abs(BANDS_36[cone.indexOf(Math.max(...cone))]! - peak)).toBeLessThanOrEqual(6)
    expect(Math.max(...cone)).toBeCloseTo(1, 1)
  }
  expect(bassCatch(flat(1))).toEqual({ green: expect.closeTo(1, 12) as number, red: expect.closeTo(1, 12) as number })
})
it('tells less of red from black where the water has taken the red', () => {
  const deep = waterLight({ water: 'IB', depth: 15, distance: 0 }).power
  expect(toldApartByBass(red, black, deep).hue).toBeLessThan(0.8 * toldApartByBass(red, black).hue)
})
