import fc from 'fast-check'
import { expect, it } from 'vitest'
import { addLayers, filmLayer, layOver, layOverFraction, overGround } from '../../../shared/optics/film'
import { coefficient, magnitude, passes, share } from './draws'

const film = (K: number, S: number, X: number) => {
  const { R, T } = filmLayer([K], [S], X)
  return { R: R[0]!, T: T[0]! }
}
const over = (K: number, S: number, X: number, ground: number) => {
  const { R, T } = film(K, S, X)
  return overGround(R, T, ground)
}

it('creates no light', () => {
  fc.assert(fc.property(coefficient, coefficient, passes, share, (K, S, X, ground) => {
    const { R, T } = film(K, S, X)
    expect(R).toBeGreaterThanOrEqual(0)
    expect(T).toBeGreaterThanOrEqual(0)
    expect(R + T).toBeLessThanOrEqual(1 + 1e-14)
    expect(over(K, S, X, ground)).toBeLessThanOrEqual(1 + 1e-12)
  }))
})
it('loses no light in a film that only scatters', () => {
  fc.assert(fc.property(coefficient, passes, (S, X) => {
    const { R, T } = film(0, S, X)
    expect(R + T).toBeCloseTo(1, 14)
  }))
})
it('gives two thin coats the same colour as one coat of their summed passes', () => {
  fc.assert(fc.property(coefficient, coefficient, passes, passes, share, (K, S, first, second, ground) => {
    expect(over(K, S, second, over(K, S, first, ground))).toBeCloseTo(over(K, S, first + second, ground), 12)
  }))
})
it('shows the ground through no passes at all', () => {
  fc.assert(fc.property(coefficient, coefficient, share, (K, S, ground) => {
    expect(over(K, S, 0, ground)).toBeCloseTo(ground, 15)
  }))
})
it('hides any ground when the coat is endless', () => {
  fc.assert(fc.property(magnitude(-3, 1.5), magnitude(-3, 1.5), share, (K, S, ground) => {
    const a = 1 + K / S
    expect(over(K, S, 1e8, ground)).toBeCloseTo(1 / (a + Math.sqrt(a * a - 1)), 12)
  }))
})
it('lets a pure candy follow Beer and Lambert, down and up again', () => {
  fc.assert(fc.property(coefficient, passes, share, (K, X, ground) => {
    expect(over(K, 0, X, ground)).toBeCloseTo(ground * Math.exp(-2 * K * X), 14)
  }))
})
// A candy that passes 0.8 of the light down and up: 0.8² … 0.8⁸ over white (Beer–Lambert, worked out)
it.each([[1, 0.64], [2, 0.4096], [4, 0.1678]])('darkens a candy of transmittance 0.8 over white to its value at %i passes', (X, expected) => {
  expect(over(-Math.log(0.8), 0, X, 1)).toBeCloseTo(expected, 4)
})
it('minds the order of two different coats', () => {
  const whiteOverBlack = over(0, 2, 1, over(2, 0, 1, 0.5))
  const blackOverWhite = over(2, 0, 1, over(0, 2, 1, 0.5))
  expect(whiteOverBlack).toBeGreaterThan(blackOverWhite + 0.2)
})
it('keeps a stack as a fraction and gets the same reflectance at the end', () => {
  fc.assert(fc.property(fc.array(fc.tuple(coefficient, coefficient, passes), { maxLength: 12 }), share, (coats, ground) => {
    const fraction = Float64Array.of(ground, 1)
    let step = ground
    for (const [K, S, X] of coats) {
      const { R, T } = film(K, S, X)
      layOverFraction(R, T, fraction[0]!, fraction[1]!, fraction)
      step = overGround(R, T, step)
    }
    // A fraction of a whole stack of hiding coats may underflow to 0/0; pictures renormalise long before.
    if (fraction[1]! > 1e-200) expect(fraction[0]! / fraction[1]!).toBeCloseTo(step, 9)
  }))
})
it('joins unlike layers as it lays them one by one', () => {
  fc.assert(fc.property(coefficient, coefficient, passes, coefficient, coefficient, passes, share, (K1, S1, X1, K2, S2, X2, ground) => {
    const alike = ({ R, T }: { R: number, T: number }) => ({ above: R, below: R, T })
    const joined = addLayers(alike(film(K1, S1, X1)), alike(film(K2, S2, X2)))
    expect(overGround(joined.above, joined.T, 0)).toBeCloseTo(over(K1, S1, X1, over(K2, S2, X2, 0)), 12)
    const whole = joined.above + joined.T ** 2 * ground / (1 - joined.below * ground)
    if (joined.below * ground < 1 - 1e-9) expect(whole).toBeCloseTo(over(K1, S1, X1, over(K2, S2, X2, ground)), 7)
  }))
})
it('stands absurdly thick and strong coats', () => {
  for (const [K, S, X] of [[1, 1, 1e300], [0, 1, 1e308], [1e300, 1e299, 1e300], [0, 0, 1e308], [1e-300, 1, 1e300]] as const) {
    const { R, T } = film(K, S, X)
    expect(R >= 0 && R <= 1 && T >= 0 && T <= 1).toBe(true)
  }
})
it.each([[-1, 1, 1], [1, -1, 1], [1, 1, -1], [Number.NaN, 1, 1], [1, 1, Infinity]])('refuses K %d, S %d, passes %d', (K, S, X) => {
  expect(() => filmLayer([K], [S], X)).toThrow(RangeError)
})
it('refuses spectra of different lengths', () => {
  expect(() => filmLayer([1, 1], [1], 1)).toThrow(RangeError)
  expect(() => layOver(filmLayer([1], [1], 1), [0.5, 0.5])).toThrow(RangeError)
})
