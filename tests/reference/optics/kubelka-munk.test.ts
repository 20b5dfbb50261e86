import { expect, it } from 'vitest'
import { filmInto, filmLayer, overGround } from '../../../shared/optics/film'
import truth from './km.json'

it('agrees with 40-digit arithmetic for a film alone and over a ground', () => {
  const pair = new Float64Array(2)
  let worst = 0
  for (const [K, S, X, ground, R, T, over] of truth.cases) {
    filmInto(K!, S!, X!, pair)
    worst = Math.max(worst, Math.abs(pair[0]! - R!), Math.abs(pair[1]! - T!), Math.abs(overGround(pair[0]!, pair[1]!, ground!) - over!))
  }
  expect(truth.cases).toHaveLength(300)
  expect(worst).toBeLessThan(1e-15)
})

// Kubelka's closed forms, worked out by hand: R∞ 0.8 means K/S = 0.025, and with SX = 3 the film shows 0.7105 over black.
it('shows 0.7105 over black and 0.8 over its own masstone when R∞ is 0.8 and SX is 3', () => {
  const { R, T } = filmLayer([0.025 * 3], [3], 1)
  expect(R[0]).toBeCloseTo(0.7105, 4)
  expect(overGround(R[0]!, T[0]!, 0.8)).toBeCloseTo(0.8, 12)
  expect(R[0]! / overGround(R[0]!, T[0]!, 0.8)).toBeCloseTo(0.8881, 4)
})

// K/S = (1 − R∞)²/2R∞; P. Kubelka, F. Munk, Z. tech. Phys. 12 (1931) 593
it.each([[0.25, 0.5], [1.6, 0.2]])('gives K/S %d an endless reflectance of %d', (ratio, endless) => {
  expect(filmLayer([ratio], [1], 1000).R[0]).toBeCloseTo(endless, 12)
})
