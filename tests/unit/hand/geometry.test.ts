import fc from 'fast-check'
import { expect, it } from 'vitest'
import { distanceToPiece, type FlatPoint, ringArea } from '#shared/scheme/outline/flat'
import { AS_THEY_CAME, placed, type Placing } from '#shared/scheme/outline/placing'
import { simplifyLine, simplifyRing, simplifyTo } from '#shared/scheme/outline/simplify-line'

const figure = fc.double({ min: -200, max: 200, noNaN: true })
const line = fc.array(fc.tuple(figure, figure), { minLength: 2, maxLength: 80 })
const placing: fc.Arbitrary<Placing> = fc.record({ along: figure, up: figure, turn: figure, scale: fc.double({ min: 0.05, max: 20, noNaN: true }), mirrored: fc.boolean() })

const farthest = (points: readonly FlatPoint[], kept: readonly number[], isRing: boolean) => Math.max(...points.map((point) => {
  const line = isRing ? [...kept, kept[0]!] : kept
  return Math.min(...line.slice(1).map((to, i) => distanceToPiece(point, points[line[i]!]!, points[to]!)))
}))

it('keeps a drawn line within the tolerance, and its two ends', () => {
  fc.assert(fc.property(line, fc.double({ min: 0, max: 40, noNaN: true }), (points, tolerance) => {
    const kept = simplifyLine(points, tolerance)
    expect(kept[0]).toBe(0)
    expect(kept.at(-1)).toBe(points.length - 1)
    expect(farthest(points, kept, false)).toBeLessThanOrEqual(tolerance + 1e-9)
  }))
})

it('keeps a drawn outline within the tolerance, all the way round', () => {
  fc.assert(fc.property(line, fc.double({ min: 0, max: 40, noNaN: true }), (points, tolerance) => {
    const kept = simplifyRing(points, tolerance)
    expect(new Set(kept).size).toBe(kept.length)
    expect(farthest(points, kept, true)).toBeLessThanOrEqual(tolerance + 1e-9)
  }))
})

it('leaves a straight line its two ends, and says how coarse a crowded one became', () => {
  expect(simplifyLine(Array.from({ length: 50 }, (_, i) => [i, 2 * i] as const), 0.01)).toEqual([0, 49])
  const circle = Array.from({ length: 1000 }, (_, i): FlatPoint => [50 * Math.cos(i / 500 * Math.PI), 50 * Math.sin(i / 500 * Math.PI)])
  const { kept, tolerance } = simplifyTo(circle, 0.001, 40, true)
  expect(kept.length).toBeLessThanOrEqual(40)
  expect(farthest(circle, kept, true)).toBeLessThanOrEqual(tolerance)
})

it('turned over twice is as it was', () => {
  fc.assert(fc.property(fc.array(line, { minLength: 1, maxLength: 5 }), (outlines) => {
    const over = { ...AS_THEY_CAME, mirrored: true }
    placed(placed(outlines, over), over).flat().forEach((point, i) => {
      expect(point[0]).toBeCloseTo(outlines.flat()[i]![0], 9)
      expect(point[1]).toBeCloseTo(outlines.flat()[i]![1], 9)
    })
  }))
})

it('scales an area by the square of the scale, and turns it over with its sign', () => {
  fc.assert(fc.property(line, placing, (ring, at) => {
    const [laid = []] = placed([ring], at)
    const expected = ringArea(ring) * at.scale ** 2 * (at.mirrored ? -1 : 1)
    expect(Math.abs(ringArea(laid) - expected)).toBeLessThan(1e-6 * Math.max(1, at.scale ** 2) * 1e3)
  }))
})
