import { describe, expect, it } from 'vitest'
import { deltaE1976, deltaE2000 } from '#shared/optics/delta-e'
import { nearnessFloor } from '#shared/scheme/wall/nearness'
import type { Lab } from '#shared/shelf/paint'

/** Numbers between 0 and 1, alike at every run (a linear congruential generator). */
function* numbers(seed: number): Generator<number, never> {
  for (let at = seed; ;) {
    at = (Math.imul(at, 1664525) + 1013904223) >>> 0
    yield at / 2 ** 32
  }
}

const source = numbers(20261201)
const next = () => source.next().value
const anywhere = (): Lab => [next() * 105, next() * 260 - 130, next() * 260 - 130]

/** Greys, the neighbourhood of 275° where hue and chroma lean on each other, and the corners of what paint can show. */
const WANTED: Lab[] = [
  [50, 0, 0], [0, 0, 0], [100, 0, 0], [62, 2, -3], [30, 10, -45], [40, 0, -60], [32, 79, -108], [55, -5, -40], [45, 60, 35], [88, -20, 85], [60, -55, 40], [70, 0.5, 12],
  ...Array.from({ length: 20 }, anywhere),
]

describe('the floor under CIEDE2000', () => {
  it('is above no colour, near, far, or turned about the hue where the formula leans', () => {
    for (const wanted of WANTED) {
      const floor = nearnessFloor(wanted)
      const above: string[] = []
      for (let i = 0; i < 800; i++) {
        const size = 10 ** (next() * 4 - 2)
        const other: Lab = i % 2 === 0 ? anywhere() : [wanted[0] + (next() - 0.5) * size, wanted[1] + (next() - 0.5) * size, wanted[2] + (next() - 0.5) * size]
        if (floor(deltaE1976(wanted, other)) > deltaE2000(wanted, other) + 1e-9) above.push(`${wanted.join(' ')} to ${other.join(' ')}`)
      }
      expect(above).toEqual([])
    }
  })

  it('is of use: a few units of straight distance rule out what is hardly seen', () => {
    expect(nearnessFloor([50, 0, 0])(4)).toBeGreaterThan(2.5)
    expect(nearnessFloor([45, 60, 35])(6)).toBeGreaterThan(1.1)
    expect(nearnessFloor([30, 10, -45])(12)).toBeGreaterThan(1)
  })

  it('never falls as the distance grows, and starts at nothing', () => {
    for (const wanted of WANTED) {
      const floor = nearnessFloor(wanted)
      const rising = Array.from({ length: 60 }, (_, i) => floor(i * 2.5))
      expect(rising[0]).toBe(0)
      rising.slice(1).forEach((value, i) => expect(value).toBeGreaterThanOrEqual(rising[i]!))
    }
  })
})
