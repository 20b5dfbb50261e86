import fc from 'fast-check'
import { expect, it } from 'vitest'
import { edgeSpread, erf, openShareOfNet, parallelStrokes, passesAcrossStroke, passesAtSoftEdge, tiledReflectance } from '../../../shared/optics/partial-cover'
import { magnitude, share } from './draws'

// Abramowitz & Stegun, table 7.1
it.each([[0, 0], [0.5, 0.5204998778], [1, 0.8427007929], [2, 0.9953222650], [-1, -0.8427007929]])('has erf(%d) as the tables do', (x, expected) => {
  expect(erf(x)).toBeCloseTo(expected, 10)
})
it('joins its series and its fraction without a step', () => {
  expect(erf(2.5 - 1e-12)).toBeCloseTo(erf(2.5 + 1e-12), 11)
})
it('averages tiles by area', () => {
  fc.assert(fc.property(share, share, share, (part, a, b) => {
    const [seen] = tiledReflectance([{ share: part, reflectance: [a] }, { share: 1 - part, reflectance: [b] }])
    expect(seen).toBeCloseTo(part * a + (1 - part) * b, 12)
  }))
})
it('refuses tiles that do not cover the surface', () => {
  expect(() => tiledReflectance([{ share: 0.4, reflectance: [1] }])).toThrow(RangeError)
})
it('lays half the passes right at an edge and all of them well past it', () => {
  expect(passesAtSoftEdge(3, 0, 0.4)).toBeCloseTo(1.5, 14)
  expect(passesAtSoftEdge(3, 4, 0.4)).toBeCloseTo(3, 12)
  expect(passesAtSoftEdge(3, -4, 0.4)).toBeCloseTo(0, 12)
  expect(passesAtSoftEdge(3, 0.01, 0)).toBe(3)
})
it('softens an edge with the height of the mask', () => {
  expect(edgeSpread(2, 45)).toBeCloseTo(2, 12)
  expect(edgeSpread(0, 20)).toBe(0)
})
it('finds the mean and the ripple that adding up strokes gives', () => {
  fc.assert(fc.property(magnitude(-0.5, 0.5), magnitude(-0.3, 0.15), (spread, wide) => {
    const pitch = spread * wide * 1.6
    const { mean, ripple } = parallelStrokes(1, spread, pitch)
    const at = (x: number) => Array.from({ length: 81 }, (_, i) => passesAcrossStroke(1, x - (i - 40) * pitch, spread)).reduce((a, b) => a + b)
    expect((at(0) + at(pitch / 2)) / 2).toBeCloseTo(mean, 3)
    expect(Math.abs((at(0) - at(pitch / 2)) / 2 / mean - ripple)).toBeLessThan(1e-3)
  }))
})
it('leaves a quarter of the surface open under threads half as wide as the pitch', () => {
  expect(openShareOfNet(4, 2)).toBeCloseTo(0.25, 14)
  expect(openShareOfNet(4, 0)).toBe(1)
  expect(() => openShareOfNet(4, 5)).toThrow(RangeError)
})
