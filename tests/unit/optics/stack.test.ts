import fc from 'fast-check'
import { expect, it } from 'vitest'
import { lchFromLab } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { filmOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { coloursOnTheWayUp, promise, stackReflectance } from '../../../shared/optics/stack'
import { measuredFromInternal } from '../../../shared/optics/surface'
import { coefficient, flat, passes, share } from './draws'

const pearl = (thickness: number) =>
  paintOpticsFrom({ how: 'interference', thickness, oxide: 'anatase', flakesPerPass: 0.4, sigma: 8, edge: 0.06 })
const over = (ground: number, thickness: number) =>
  promise({ ground: flat(ground), coats: [{ optics: pearl(thickness), passes: 2 }], finish: 'gloss' })

it('shows the bare ground through its surface when nothing is sprayed', () => {
  const { measured } = stackReflectance({ ground: flat(0.4), coats: [], finish: 'satin' })
  expect(measured[10]).toBeCloseTo(measuredFromInternal(0.4, 'satin'), 15)
})
it('ends on the way up where the promise is', () => {
  fc.assert(fc.property(fc.array(fc.tuple(coefficient, coefficient, passes), { maxLength: 6 }), share, (coats, ground) => {
    const stack = {
      ground: flat(ground),
      coats: coats.map(([K, S, X]) => ({ optics: filmOptics(flat(K), flat(S)), passes: X })),
      finish: 'satin' as const,
    }
    const way = coloursOnTheWayUp(stack)
    expect(way).toHaveLength(coats.length + 1)
    expect(way.at(-1)!.lab).toEqual(promise(stack).lab)
  }), { numRuns: 40 })
})
it.each([['red', 94, 33, 10], ['blue', 125, 74, 23], ['green', 155, 30, 12]])('makes a %s pearl stand out over black and wash out over white', (_, thickness) => {
  const [, black] = lchFromLab(over(0.02, thickness as number).angles![25].lab)
  const [, white] = lchFromLab(over(0.9, thickness as number).angles![25].lab)
  expect(black).toBeGreaterThan(24)
  expect(black / white).toBeGreaterThan(2)
})
it.each([[75], [94], [125], [155]])('turns the flop of a %i nm pearl over white to the hue across from its face', (thickness) => {
  const { face, flop } = over(0.9, thickness)
  const across = Math.abs((lchFromLab(flop!.lab)[2] - lchFromLab(face!.lab)[2] + 360) % 360 - 180)
  expect(across).toBeLessThan(60)
})
it('darkens aluminium flake from face to flop', () => {
  const optics = paintOpticsFrom({ how: 'metallic', flakesPerPass: 0.5, sigma: 9, edge: 0.06 })
  const { angles } = promise({ ground: flat(0.02), coats: [{ optics, passes: 4 }], finish: 'gloss' })
  const lightness = ([15, 25, 45, 75, 110] as const).map(angle => angles![angle].lab[0])
  expect(lightness[0]).toBeGreaterThan(110)
  expect(lightness[4]).toBeLessThan(62)
  lightness.slice(1).forEach((L, i) => expect(L).toBeLessThan(lightness[i]!))
})
it('dims and tints a pearl by the candy over it', () => {
  const candy = paintOpticsFrom({ how: 'dye-over-white', overWhite: [50, 60, 40], passes: 2 })
  const coats = [{ optics: pearl(50), passes: 2 }, { optics: candy, passes: 2 }]
  const bare = promise({ ground: flat(0.02), coats: coats.slice(0, 1), finish: 'gloss' })
  const tinted = promise({ ground: flat(0.02), coats, finish: 'gloss' })
  expect(tinted.face!.lab[0]).toBeLessThan(bare.face!.lab[0])
  expect(lchFromLab(tinted.face!.lab)[1]).toBeGreaterThan(40)
})
it('shows two metamers alike in daylight and apart under the shop tube', () => {
  const one = flat(0.4)
  const two = one.map((value, i) => value + 0.25 * Math.sin(i * 1.9))
  const seen = (ground: Float64Array, light: 'D65' | 'F11') => promise({ ground, coats: [], finish: 'gloss' }, light).lab
  const daylight = deltaE2000(seen(one, 'D65'), seen(two, 'D65'))
  expect(deltaE2000(seen(one, 'F11'), seen(two, 'F11'))).toBeGreaterThan(2 * daylight)
})
it.each([[new Float64Array(35)], [flat(1.1)], [flat(Number.NaN)]])('refuses a ground that is no ground', (ground) => {
  expect(() => stackReflectance({ ground, coats: [], finish: 'matt' })).toThrow(RangeError)
})
