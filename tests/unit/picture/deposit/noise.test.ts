import { describe, expect, it } from 'vitest'
import { addThreeNoises, addThreeSpaceNoises, fbm, gradientNoise, newSlope, noise2, seedOf } from '#shared/picture/deposit/noise'
import { mean, spread } from './bench'

const COUNT = 60_000
const sampled = (at: (x: number, y: number) => number) => Float64Array.from({ length: COUNT }, (_, i) => at((i % 250) * 0.618 - 40, Math.floor(i / 250) * 0.731 - 30))

describe('noise', () => {
  const work = newSlope()
  const three = new Float64Array(3)
  it.each<[string, (x: number, y: number) => number]>([
    ['in the plane', (x, y) => noise2(x, y, 3)],
    ...[0, 1, 2].flatMap((k): [string, (x: number, y: number) => number][] => [
      [`of three in the plane, number ${k}`, (x, y) => {
        three.fill(0)
        addThreeNoises(x, y, 3, 1, three)
        return three[k] ?? 0
      }],
      [`of three in space, number ${k}`, (x, y) => {
        three.fill(0)
        addThreeSpaceNoises(x, y, 0.37 * x - 0.2 * y, 3, 1, three)
        return three[k] ?? 0
      }],
    ]),
    ['of slopes', (x, y) => {
      gradientNoise(x, y, 3, work)
      return work.value
    }],
    ['of several sizes', (x, y) => fbm(x, y, 4, 3, work)],
  ])('%s has mean 0 and unit variance', (_name, at) => {
    const values = sampled(at)
    expect(mean(values)).toBeCloseTo(0, 1)
    expect(spread(values)).toBeGreaterThan(0.96)
    expect(spread(values)).toBeLessThan(1.04)
  })

  it('is the same at the same place, and another with another seed', () => {
    expect(noise2(12.3, -4.5, 7)).toBe(noise2(12.3, -4.5, 7))
    expect(noise2(12.3, -4.5, 7)).not.toBe(noise2(12.3, -4.5, 8))
  })

  it('runs on without a jump from cell to cell', () => {
    for (const at of [-2, -1, 0, 1, 5]) {
      addThreeSpaceNoises(at - 1e-6, at + 1e-6, at - 1e-6, 4, 1, three.fill(0))
      addThreeSpaceNoises(at + 1e-6, at - 1e-6, at + 1e-6, 4, -1, three)
      three.forEach(jump => expect(Math.abs(jump)).toBeLessThan(1e-3))
      expect(Math.abs(noise2(at - 1e-6, 0.4, 4) - noise2(at + 1e-6, 0.4, 4))).toBeLessThan(1e-3)
    }
  })

  it('the three are independent', () => {
    const [a, b, c] = [0, 1, 2].map(k => sampled((x, y) => {
      addThreeNoises(x, y, 3, 1, three.fill(0))
      return three[k] ?? 0
    }))
    for (const [p, q] of [[a, b], [b, c], [a, c]]) {
      expect(Math.abs(mean((p ?? []).map((value: number, i: number) => value * (q?.[i] ?? 0))))).toBeLessThan(0.03)
    }
  })

  it('knows its own slopes', () => {
    const [here, right, up] = [newSlope(), newSlope(), newSlope()]
    const step = 1e-6
    for (const [x, y] of [[0.3, 0.8], [-3.7, 2.2], [10.01, -5.99]] as const) {
      gradientNoise(x, y, 9, here)
      gradientNoise(x + step, y, 9, right)
      gradientNoise(x, y + step, 9, up)
      expect((right.value - here.value) / step).toBeCloseTo(here.dx, 3)
      expect((up.value - here.value) / step).toBeCloseTo(here.dy, 3)
    }
  })

  it('a coat\'s id gives a seed of its own for each use', () => {
    const seeds = ['a', 'b', 'coat-1', 'coat-2'].flatMap(name => [1, 2, 3].map(use => seedOf(name, use)))
    expect(new Set(seeds).size).toBe(seeds.length)
  })
})
