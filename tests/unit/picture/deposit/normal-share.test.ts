import { describe, expect, it } from 'vitest'
import { normalShare, smoothStep } from '#shared/picture/deposit/normal-share'

describe('share of a soft edge', () => {
  it('is the normal cumulative', () => {
    // Abramowitz and Stegun, Handbook of Mathematical Functions, table 26.1.
    expect(normalShare(0)).toBeCloseTo(0.5, 6)
    expect(normalShare(1)).toBeCloseTo(0.841344746, 5)
    expect(normalShare(-2)).toBeCloseTo(0.022750132, 5)
    expect(normalShare(0.5)).toBeCloseTo(0.691462461, 5)
  })

  it('is symmetric, and exactly nothing or all beyond four softnesses', () => {
    for (const x of [0.1, 0.77, 1.5, 3.3]) expect(normalShare(x) + normalShare(-x)).toBeCloseTo(1, 6)
    expect([normalShare(-4), normalShare(-50), normalShare(4), normalShare(Infinity), normalShare(-Infinity)]).toEqual([0, 0, 1, 1, 0])
  })

  it('a smooth step rises or falls between its ends', () => {
    expect([smoothStep(1, 3, 0), smoothStep(1, 3, 2), smoothStep(1, 3, 4)]).toEqual([0, 0.5, 1])
    expect([smoothStep(0.12, 0.02, 0.2), smoothStep(0.12, 0.02, 0.01)]).toEqual([0, 1])
  })
})
