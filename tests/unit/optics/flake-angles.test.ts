import { describe, expect, it } from 'vitest'
import { coatLayer } from '../../../shared/optics/coat-layer'
import { labFromReflectance } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { layOver } from '../../../shared/optics/film'
import { ASPECULAR, flakeGeometry, radianceAtAngles } from '../../../shared/optics/flake-angles'
import { mixOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { promise } from '../../../shared/optics/stack'
import { measuredSpectrum, WATER_SURFACE } from '../../../shared/optics/surface'
import { flat } from './draws'

const pearl = (thickness: number) => paintOpticsFrom({ how: 'interference', thickness, oxide: 'anatase', flakesPerPass: 0.4, sigma: 8, edge: 0.06 })
const candy = paintOpticsFrom({ how: 'dye-over-white', overWhite: [50, 62, 36], passes: 2 })
const PAINTS = [
  ['gold pearl', pearl(75)], ['blue pearl', pearl(125)], ['bronze', paintOpticsFrom({ how: 'interference', thickness: 60, oxide: 'hematite', flakesPerPass: 0.5, sigma: 9, edge: 0.05 })],
  ['aluminium', paintOpticsFrom({ how: 'metallic', flakesPerPass: 0.5, sigma: 9, edge: 0.06 })], ['two pearls', mixOptics([{ optics: pearl(75), drops: 1 }, { optics: pearl(125), drops: 1 }])],
  ['pearl in candy', mixOptics([{ optics: pearl(75), drops: 2 }, { optics: candy, drops: 1 }])],
] as const

describe.each(PAINTS)('%s', (_, optics) => {
  const coat = { optics, passes: 2 }, layer = coatLayer(optics, 2)
  const every = Array.from({ length: 131 }, (_, degrees) => degrees)
  const seen = (ground: number) => radianceAtAngles([coat], [layer], measuredSpectrum(layOver(layer, flat(ground)), 'gloss'), every)

  it.each([0.02, 0.9])('has a colour at every angle, and no jump from one degree to the next, over a ground of %d', (ground) => {
    const radiance = seen(ground)
    const colours = every.map(angle => labFromReflectance(radiance[angle]!))
    expect(colours.flat().every(Number.isFinite)).toBe(true)
    colours.slice(1).forEach((lab, i) => expect(deltaE2000(lab, colours[i]!)).toBeLessThan(3))
  })
  it('has at the five angles what is promised', () => {
    const radiance = seen(0.02)
    const { angles } = promise({ ground: flat(0.02), coats: [coat], finish: 'gloss' })
    for (const angle of ASPECULAR) expect(deltaE2000(labFromReflectance(radiance[angle]!), angles![angle].lab)).toBeLessThan(1e-9)
  })
  it('is lightest towards the gloss over black', () => {
    const radiance = seen(0.02)
    const lightness = [15, 25, 45, 75, 110].map(angle => labFromReflectance(radiance[angle]!)[0])
    expect(lightness[0]).toBe(Math.max(...lightness))
  })
})

it('turns flakes to the eye less far in water, where light is bent less', () => {
  const tiltless = flakeGeometry(45, 40).cosine, inWater = flakeGeometry(45, 40, WATER_SURFACE.index).cosine
  expect(inWater).toBeLessThan(tiltless)
  // Snell's law by hand, lamp at 45° and eye upright: half the lamp's angle inside the film.
  expect(inWater).toBeCloseTo(Math.cos(Math.asin(Math.SQRT1_2 * 1.333 / 1.5) / 2), 12)
})
