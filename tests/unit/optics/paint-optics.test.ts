import fc from 'fast-check'
import { expect, it } from 'vitest'
import { type Lab, labFromXyz, lchFromLab, xyzFromReflectance } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { xyzFromLinearRgb } from '../../../shared/optics/screen-colour'
import { ENGINE_VERSION } from '../../../shared/optics/engine-version'
import { CARD_BLACK, CARD_WHITE, groundFromLab, hidesTooWell } from '../../../shared/optics/known-film'
import { mixOptics, type PaintOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { promise, stackReflectance } from '../../../shared/optics/stack'
import { flat, linearRgb, magnitude } from './draws'

const on = (ground: Lab, optics: PaintOptics, passes: number) =>
  promise({ ground: groundFromLab(ground), coats: [{ optics, passes }], finish: 'gloss' }).lab
const opaque = paintOpticsFrom({ how: 'two-swatches', overBlack: [48, 20, 30], overWhite: [55, 22, 35], passes: 1 })

it('promises the two swatches it was told', () => {
  const optics = paintOpticsFrom({ how: 'two-swatches', overBlack: [30, 20, 15], overWhite: [58, 40, 35], passes: 2 })
  expect(optics).toMatchObject({ engineVersion: ENGINE_VERSION, bands: 36, kind: 'film', clipped: false })
  expect(deltaE2000(on(CARD_BLACK, optics, 2), [30, 20, 15])).toBeLessThan(1e-3)
  expect(deltaE2000(on(CARD_WHITE, optics, 2), [58, 40, 35])).toBeLessThan(1e-3)
})
it('promises for half the passes something between the ground and the swatch', () => {
  const [L] = on(CARD_BLACK, opaque, 0.5)
  expect(L).toBeGreaterThan(CARD_BLACK[0])
  expect(L).toBeLessThan(48)
})
it('is plain data that survives being stored', () => {
  expect(JSON.parse(JSON.stringify(opaque))).toEqual(opaque)
})
it('never has a negative or endless coefficient, whatever colours it is told', () => {
  fc.assert(fc.property(linearRgb, linearRgb, magnitude(-0.5, 1), (dark, light, passes) => {
    const optics = paintOpticsFrom({ how: 'two-swatches', overBlack: labFromXyz(xyzFromLinearRgb(dark)), overWhite: labFromXyz(xyzFromLinearRgb(light)), passes })
    expect([...optics.K, ...optics.S].every(value => value >= 0 && Number.isFinite(value))).toBe(true)
  }), { numRuns: 60 })
})
it('owns up when the swatch over black is lighter than the one over white', () => {
  expect(paintOpticsFrom({ how: 'two-swatches', overBlack: [70, 0, 0], overWhite: [60, 0, 0], passes: 1 }).clipped).toBe(true)
})
it('does not cry wolf over a vivid candy whose colours it gives back', () => {
  const optics = paintOpticsFrom({ how: 'two-swatches', overBlack: [4, 9, 4], overWhite: [55, 65, 45], passes: 2 })
  expect(optics.clipped).toBe(false)
  expect(deltaE2000(on(CARD_WHITE, optics, 2), [55, 65, 45])).toBeLessThan(0.5)
})
it('asks for a thinner swatch when the paint hides', () => {
  expect(hidesTooWell([50, 20, 30], [50.2, 20, 30])).toBe(true)
  expect(hidesTooWell([45, 20, 30], [50, 20, 30])).toBe(false)
})
it('reaches the masstone when thick, and 98 % hiding at the passes it was told', () => {
  const masstone: Lab = [52, 40, 30]
  const optics = paintOpticsFrom({ how: 'masstone-hide', masstone, passesToHide: 4 })
  expect(deltaE2000(on(CARD_WHITE, optics, 60), masstone)).toBeLessThan(0.01)
  const luminance = (ground: number) => {
    const internal = flat(ground)
    return xyzFromReflectance(stackReflectance({ ground: internal, coats: [{ optics, passes: 4 }], finish: 'gloss' }).measured)[1]
  }
  // Ground of luminance 0.80 as measured is 0.926 inside the film.
  expect(luminance(0) / luminance(0.9259)).toBeCloseTo(0.98, 3)
})
it('promises a dye its colour over white, and nothing over black', () => {
  const optics = paintOpticsFrom({ how: 'dye-over-white', overWhite: [60, 55, 50], passes: 3 })
  expect(deltaE2000(on(CARD_WHITE, optics, 3), [60, 55, 50])).toBeLessThan(0.5)
  expect(on(CARD_BLACK, optics, 3)[0]).toBeLessThanOrEqual(10)
})
it('promises a hazy dye its colour too', () => {
  const optics = paintOpticsFrom({ how: 'dye-over-white', overWhite: [60, 55, 50], passes: 3, haze: 0.02 })
  expect(deltaE2000(on(CARD_WHITE, optics, 3), [60, 55, 50])).toBeLessThan(0.5)
  expect(on(CARD_BLACK, optics, 3)[0]).toBeGreaterThan(10)
})
it('yellows under an old clear', () => {
  const [, , fresh] = on(CARD_WHITE, paintOpticsFrom({ how: 'clear' }), 1)
  const [, , old] = on(CARD_WHITE, paintOpticsFrom({ how: 'clear', yellowing: 0.05 }), 1)
  expect(fresh).toBeCloseTo(CARD_WHITE[2], 6)
  expect(old).toBeGreaterThan(fresh + 2)
})
it('mixes blue and yellow drops to a green, and half drops with clear to half strength', () => {
  const yellow = paintOpticsFrom({ how: 'dye-over-white', overWhite: [88, -6, 80], passes: 1 })
  const blue = paintOpticsFrom({ how: 'dye-over-white', overWhite: [60, -15, -45], passes: 1 })
  const [, C, h] = lchFromLab(on(CARD_WHITE, mixOptics([{ optics: yellow, drops: 3 }, { optics: blue, drops: 2 }]), 2))
  expect(h > 120 && h < 190 && C > 15).toBe(true)
  const thinned = mixOptics([{ optics: opaque, drops: 2 }, { optics: paintOpticsFrom({ how: 'clear' }), drops: 2 }])
  expect(on(CARD_BLACK, thinned, 2)).toEqual(on(CARD_BLACK, opaque, 1).map(value => expect.closeTo(value, 9)))
})
it('keeps a pearl a pearl when a candy is dropped in', () => {
  const pearl = paintOpticsFrom({ how: 'interference', wanted: [60, 0, 0], oxide: 'anatase', flakesPerPass: 0.6, sigma: 8, edge: 0.05 })
  const candy = paintOpticsFrom({ how: 'dye-over-white', overWhite: [60, 55, 50], passes: 1 })
  const mix = mixOptics([{ optics: pearl, drops: 4 }, { optics: candy, drops: 1 }])
  expect(mix).toMatchObject({ kind: 'flake', how: 'interference', flake: { flakesPerPass: expect.closeTo(0.48, 12) as number } })
  expect(lchFromLab(promise({ ground: flat(0.9), coats: [{ optics: mix, passes: 2 }], finish: 'gloss' }).lab)[1]).toBeGreaterThan(10)
})
it('refuses empty cups and negative drops', () => {
  expect(() => mixOptics([])).toThrow(/drop/)
  expect(() => mixOptics([{ optics: opaque, drops: -1 }])).toThrow(/drops/)
})
it('refuses what it cannot work from', () => {
  expect(() => paintOpticsFrom({ how: 'two-swatches', overBlack: [30, 0, 0], overWhite: [60, 0, 0], passes: 0 })).toThrow(/passes/)
  expect(() => paintOpticsFrom({ how: 'masstone-hide', masstone: [130, 0, 0], passesToHide: 3 })).toThrow(/lightness/)
  expect(() => paintOpticsFrom({ how: 'interference', oxide: 'anatase', flakesPerPass: 0.4, sigma: 8, edge: 0.05 })).toThrow(/thickness or the colour/)
  expect(() => paintOpticsFrom({ how: 'metallic', flakesPerPass: -1, sigma: 8, edge: 0.05 })).toThrow(/flakes per pass/)
})
