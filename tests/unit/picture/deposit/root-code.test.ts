import { describe, expect, it } from 'vitest'
import { depositOf, rootCoded } from '#shared/picture/deposit/root-code'
import { hashShare } from '#shared/picture/deposit/noise'
import { mean } from './bench'

const dither = Float32Array.from({ length: 20_000 }, (_, i) => hashShare(i, 0, 1))

describe('deposits as bytes', () => {
  it('keep every deposit to a step of the root', () => {
    const deposit = Float32Array.from({ length: 1000 }, (_, i) => i / 800)
    const map = rootCoded(deposit, dither)
    deposit.forEach((x, i) => {
      expect(Math.abs(Math.sqrt(depositOf(map, i)) - Math.sqrt(x))).toBeLessThanOrEqual(1.001 * Math.sqrt(map.peak) / 255)
    })
  })

  it('leave no bands: a level between two steps is met on average', () => {
    const level = 0.4143
    const deposit = new Float32Array(20_000).fill(level)
    deposit[0] = 1
    const map = rootCoded(deposit, dither)
    const values = Array.from(deposit.keys()).slice(1).map(i => depositOf(map, i))
    expect(new Set(values).size).toBe(2)
    expect(mean(values)).toBeCloseTo(level, 4)
  })

  it('keep bare what is bare', () => {
    const map = rootCoded(Float32Array.of(0, 1, 0, -0.2), dither.slice(7, 11))
    expect([map.codes[0], map.codes[2], map.codes[3]]).toEqual([0, 0, 0])
    expect(rootCoded(new Float32Array(3), dither)).toEqual({ codes: new Uint8Array(3), peak: 0 })
  })
})
