import fc from 'fast-check'
import { expect, it } from 'vitest'
import { filmLayer, layOver } from '../../../shared/optics/film'
import { coefficientsFromTwoGrounds } from '../../../shared/optics/two-grounds'
import { flat, magnitude } from './draws'

const black = flat(0.03), white = flat(0.9)
const readings = (K: number, S: number, passes: number) => {
  const film = filmLayer(flat(K), flat(S), passes)
  return { black, white, overBlack: layOver(film, black), overWhite: layOver(film, white), passes }
}

it('finds the paint again that made the swatches', () => {
  fc.assert(fc.property(fc.oneof(fc.constant(0), magnitude(-4, 0)), fc.oneof(fc.constant(0), magnitude(-4, 0)), magnitude(-1, 0.5), (K, S, passes) => {
    const found = coefficientsFromTwoGrounds(readings(K, S, passes))
    expect(found.clipped).toBe(false)
    expect(Math.abs(found.K[7]! - K)).toBeLessThan(1e-8 * (1 + K))
    expect(Math.abs(found.S[7]! - S)).toBeLessThan(1e-8 * (1 + S))
  }))
})
it('says so when the film is lighter over black than any film could be', () => {
  const found = coefficientsFromTwoGrounds({ black, white, overBlack: flat(0.8), overWhite: flat(0.7), passes: 1 })
  expect(found.clipped).toBe(true)
  expect([...found.K, ...found.S].every(value => value >= 0 && Number.isFinite(value))).toBe(true)
})
it('says so when the swatch hides and its strength is a guess', () => {
  expect(coefficientsFromTwoGrounds(readings(1, 30, 5)).clipped).toBe(true)
})
it('stays finite and never negative on any readings', () => {
  const reading = fc.double({ min: 0, max: 1, noNaN: true })
  fc.assert(fc.property(reading, reading, magnitude(-1, 1), (dark, light, passes) => {
    const { K, S } = coefficientsFromTwoGrounds({ black, white, overBlack: flat(dark), overWhite: flat(light), passes })
    expect(K[0]! >= 0 && Number.isFinite(K[0]!) && S[0]! >= 0 && Number.isFinite(S[0]!)).toBe(true)
  }))
})
it('refuses no passes, grounds that are not apart, and readings above 1', () => {
  const good = readings(0.1, 0.1, 1)
  expect(() => coefficientsFromTwoGrounds({ ...good, passes: 0 })).toThrow(/passes/)
  expect(() => coefficientsFromTwoGrounds({ ...good, black: white })).toThrow(/lighter/)
  expect(() => coefficientsFromTwoGrounds({ ...good, overWhite: flat(1.2) })).toThrow(/reading/)
  expect(() => coefficientsFromTwoGrounds({ ...good, overBlack: new Float64Array(35) })).toThrow(/36 bands/)
})
