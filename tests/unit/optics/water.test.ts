import { describe, expect, it } from 'vitest'
import { BANDS_36 } from '../../../shared/optics/bands'
import { type Lab, lchFromLab } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { CARD_WHITE, groundFromLab } from '../../../shared/optics/known-film'
import { paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { spectrumFromLab } from '../../../shared/optics/spectrum-from-colour'
import { reflectanceUnderWater, stackUnderWater, waterLight } from '../../../shared/optics/under-water'
import { SEA_WATERS, waterAttenuation, WATERS } from '../../../shared/optics/water'
import { flat } from './draws'

const at = (nm: number) => BANDS_36.indexOf(nm)
const red = spectrumFromLab([45, 60, 40]).reflectance

describe('daylight under water', () => {
  it.each(WATERS)('is as it was at no depth and no distance, and never grows: %s', (water) => {
    const here = waterLight({ water, depth: 0, distance: 0 })
    expect(here.down.every(share => share === 1) && here.path.every(share => share === 1)).toBe(true)
    const deep = waterLight({ water, depth: 5, distance: 1 })
    expect(deep.power.every((power, i) => power > 0 && power < here.power[i]!)).toBe(true)
  })
  it('dies away faster in each murkier water, where green water is clearest', () => {
    const green = SEA_WATERS.map(water => waterAttenuation(water)[at(550)]!)
    expect(green).toEqual([...green].sort((a, b) => a - b))
  })
  it('is what daylight is worth twice over at twice the depth', () => {
    const once = waterLight({ water: '5C', depth: 3, distance: 0 }).down, twice = waterLight({ water: '5C', depth: 6, distance: 0 }).down
    once.forEach((share, i) => expect(twice[i]).toBeCloseTo(share ** 2, 12))
  })
  it('loses on the way to the eye half as much again as on the way down', () => {
    const { path } = waterLight({ water: 'III', depth: 0, distance: 2 }), { down } = waterLight({ water: 'III', depth: 3, distance: 0 })
    path.forEach((share, i) => expect(share).toBeCloseTo(down[i]!, 12))
  })
  it('refuses places above the water', () => {
    expect(() => waterLight({ water: 'I', depth: -1, distance: 0 })).toThrow(/depth/)
    expect(() => waterLight({ water: 'I', depth: 1, distance: NaN })).toThrow(/distance/)
  })
})

describe('colours under water', () => {
  it('look as in air at the surface', () => {
    const { lab, labAdapted } = reflectanceUnderWater(red, { water: '3C', depth: 0, distance: 0 })
    expect(deltaE2000(lab, [45, 60, 40])).toBeLessThan(1e-6)
    expect(deltaE2000(labAdapted, [45, 60, 40])).toBeLessThan(1e-6)
  })
  it('lose red first in the sea and blue first in tea-stained water', () => {
    const blue = spectrumFromLab([45, 0, -45]).reflectance
    const left = (of: Float64Array, lab: Lab, water: 'IB' | 'tea-stained') =>
      lchFromLab(reflectanceUnderWater(of, { water, depth: water === 'IB' ? 12 : 1, distance: 0 }).lab)[1] / lchFromLab(lab)[1]
    expect(left(red, [45, 60, 40], 'IB')).toBeLessThan(0.3)
    expect(left(blue, [45, 0, -45], 'IB')).toBeGreaterThan(0.6)
    expect(reflectanceUnderWater(blue, { water: 'tea-stained', depth: 1, distance: 0 }).lab[2]).toBeGreaterThan(0)
  })
  it('leave a white white to an eye used to clear water, and not to one in the deep', () => {
    expect(lchFromLab(reflectanceUnderWater(flat(0.9), { water: 'I', depth: 5, distance: 0 }).labAdapted)[1]).toBeLessThan(1)
    expect(lchFromLab(reflectanceUnderWater(flat(0.9), { water: '9C', depth: 6, distance: 0 }).labAdapted)[1]).toBeGreaterThan(5)
  })
})

describe('a fluorescent under water', () => {
  const glowing = (overWhite: Lab, peak: number, quantumYield: number) =>
    paintOpticsFrom({ how: 'dye-over-white', overWhite, passes: 2, haze: 0.012, fluorescent: { peak, width: 56, quantumYield } })
  const lightness = (quantumYield: number, water: '1C' | '5C' | 'I', depth: number, overWhite: Lab = [58, 74, 10]) =>
    stackUnderWater({ ground: groundFromLab(CARD_WHITE), coats: [{ optics: glowing(overWhite, 614, quantumYield), passes: 2 }], finish: 'gloss' }, { water, depth, distance: 0 }).labAdapted[0]
  it('stays far brighter off the coast than the same paint that does not glow', () => {
    expect(lightness(0.92, '1C', 6) - lightness(0, '1C', 6)).toBeGreaterThan(20)
    expect(lightness(0.92, '5C', 6) - lightness(0, '5C', 6)).toBeGreaterThan(15)
  })
  it('keeps a glow where red daylight is gone', () => {
    expect(waterLight({ water: 'I', depth: 15, distance: 0 }).down[at(620)]).toBeLessThan(0.02)
    expect(lightness(0.92, 'I', 15) - lightness(0, 'I', 15)).toBeGreaterThan(15)
  })
})
