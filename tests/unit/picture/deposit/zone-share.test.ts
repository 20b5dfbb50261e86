import { describe, expect, it } from 'vitest'
import { gillEdge } from '#shared/blank/zones'
import { depositKeep } from '#shared/picture/deposit/keep'
import { girthRanges, layZoneShare } from '#shared/picture/deposit/zone-share'
import type { ZoneName } from '#shared/scheme/coat'
import { coatOf, minnow, samplesAt } from './bench'

type Place = readonly [number, number]

function shares(places: readonly Place[], zones: ZoneName[], where: object = {}): number[] {
  const keep = depositKeep(samplesAt(minnow, places), minnow)
  const out = new Float32Array(places.length)
  layZoneShare(keep, coatOf({ where: { zones, ...where } }).where, 1, null, out)
  return Array.from(out)
}

const downTheFlank = Array.from({ length: 400 }, (_, i): Place => [0.45, (i + 0.5) / 400])
const alongTheBody = Array.from({ length: 400 }, (_, i): Place => [(i + 0.5) / 400, 0.5])
/** Where a falling share passes one half, in steps of 1/400. */
const crossing = (values: number[]) => {
  const at = values.findIndex(value => value < 0.5)
  const [a, b] = [values[at - 1] ?? 0, values[at] ?? 0]
  return (at - 0.5 + (a - 0.5) / (a - b)) / 400
}

describe('zones', () => {
  it('back and upper flank are one zone, without a seam between', () => {
    const both = shares(downTheFlank, ['back', 'upper flank'], { fade: 4 })
    const top = both.slice(0, 95)
    expect(Math.min(...top)).toBeGreaterThan(0.999)
    expect(girthRanges(['upper flank', 'back'])).toEqual([[-Infinity, 0.5]])
    expect(girthRanges(['back', 'belly', 'upper flank'])).toEqual([[-Infinity, 0.5], [0.735, Infinity]])
  })

  it('all four round the girth are the whole body', () => {
    expect(Math.min(...shares(downTheFlank, ['back', 'upper flank', 'lower flank', 'belly']))).toBe(1)
    expect(Math.min(...shares(alongTheBody, ['head', 'trunk']))).toBe(1)
  })

  it('an edge lies half way through its fade on the zone\'s line, and reach moves it by that many mm', () => {
    const keep = depositKeep(samplesAt(minnow, [[0.45, 0.5]]), minnow)
    const girth = keep.girth[0] ?? 0
    for (const reach of [-2, 0, 3]) {
      for (const edge of ['hard', 'fades'] as const) {
        const at = crossing(shares(downTheFlank, ['back'], { reach, edge, fade: 2 }))
        expect((at - 0.235) * girth).toBeCloseTo(reach, 1)
      }
    }
  })

  it('a hard edge is six hundredths of a millimetre, a fade as wide as it says', () => {
    const keep = depositKeep(samplesAt(minnow, [[0.45, 0.5]]), minnow)
    const girth = keep.girth[0] ?? 0
    const at = (mm: number): Place => [0.45, 0.235 - mm / girth]
    const [hardIn, hardOut] = shares([at(0.07), at(-0.07)], ['back'], { edge: 'hard' })
    expect(hardIn).toBeGreaterThan(0.98)
    expect(hardOut).toBeLessThan(0.02)
    // One softness, half the fade, inside the line.
    expect(shares([at(3)], ['back'], { fade: 6 })[0]).toBeCloseTo(0.8413, 2)
    expect(shares([at(90 * 0.05 / 2)], ['back'])[0]).toBeCloseTo(0.8413, 2)
  })

  it('a coat lies where its zones round the girth and along the body meet', () => {
    const [headBack, headBelly, trunkBack] = shares([[0.12, 0.05], [0.12, 0.95], [0.6, 0.05]], ['head', 'back'], { fade: 1 })
    expect(headBack).toBeGreaterThan(0.99)
    expect(headBelly).toBeLessThan(0.01)
    expect(trunkBack).toBeLessThan(0.01)
  })

  it('head and trunk part at the back edge of the gill cover; tail is the end of the trunk, the cover the end of the head', () => {
    const edge = gillEdge(minnow.shape.gill, 0.5)
    expect(crossing(shares(alongTheBody, ['head'], { fade: 1 }))).toBeCloseTo(edge, 2)
    const trunk = shares(alongTheBody, ['trunk'], { fade: 1 })
    const trunkAndTail = shares(alongTheBody, ['trunk', 'tail'], { fade: 1 })
    expect(trunkAndTail).toEqual(trunk)
    expect(shares(alongTheBody, ['head', 'gill cover'], { fade: 1 })).toEqual(shares(alongTheBody, ['head'], { fade: 1 }))
    const [cover, nose, behind] = shares([[edge - 0.05, 0.5], [0.03, 0.5], [edge + 0.05, 0.5]], ['gill cover'], { fade: 1 })
    expect(cover).toBeGreaterThan(0.99)
    expect(nose).toBeLessThan(0.01)
    expect(behind).toBeLessThan(0.01)
  })

  it('gill cover and trunk are joined without a seam', () => {
    const edge = gillEdge(minnow.shape.gill, 0.5)
    const across = Array.from({ length: 50 }, (_, i): Place => [edge - 0.06 + i * 0.0024, 0.5])
    expect(Math.min(...shares(across, ['gill cover', 'trunk'], { fade: 1 }))).toBeGreaterThan(0.99)
  })

  it('limits along the body cut a coat off with their own fades', () => {
    const along = { from: 0.3, to: 0.7, fadeFrom: 0, fadeTo: 8 }
    const [before, inside, after, far] = shares([[0.28, 0.5], [0.5, 0.5], [0.7, 0.5], [0.9, 0.5]], [], { along })
    expect([before, far]).toEqual([0, expect.closeTo(0, 3)])
    expect(inside).toBeGreaterThan(0.99)
    expect(after).toBeCloseTo(0.5, 2)
  })
})
