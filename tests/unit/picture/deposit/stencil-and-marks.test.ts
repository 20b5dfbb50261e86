import { describe, expect, it } from 'vitest'
import { depositKeep } from '#shared/picture/deposit/keep'
import { layMarks } from '#shared/picture/deposit/mark-map'
import { maskMap } from '#shared/picture/deposit/mask-map'
import { outlineDistance, outlineField } from '#shared/picture/deposit/outline-field'
import { planePlace } from '#shared/picture/deposit/plane-place'
import { strokeField } from '#shared/picture/deposit/stroke-field'
import { toPlane } from '#shared/blank/surface-coordinates'
import { Mark, type Place } from '#shared/scheme/mark'
import { maskOf, minnow, samplesAt, seen } from './bench'

const box: Place[] = [[0.4, 0.35], [0.6, 0.35], [0.6, 0.6], [0.4, 0.6]]
const through = (places: readonly (readonly [number, number, (1 | -1)?])[], form: object) =>
  Array.from(maskMap(depositKeep(samplesAt(minnow, places), minnow), maskOf({ kind: 'stencil', outlines: [box], ...form })))

describe('outlines on the flat surface', () => {
  const square = outlineField([[[0, 0], [10, 0], [10, 10], [0, 10]], [[30, 0], [36, 0], [33, 6]]], 4)

  it('tell the distance to the nearest edge, negative inside', () => {
    expect(outlineDistance(square, 2, 5)).toBeCloseTo(-2, 9)
    expect(outlineDistance(square, -1.5, 5)).toBeCloseTo(1.5, 9)
    expect(outlineDistance(square, 13, 14)).toBe(4)
    expect(outlineDistance(square, 11, 12)).toBeCloseTo(Math.sqrt(5), 9)
    expect(outlineDistance(square, 33, 1)).toBeCloseTo(-1, 9)
  })

  it('agree with the plain rule everywhere, whatever bin a place falls in', () => {
    for (let x = -5.03; x < 15; x += 0.37) {
      for (let y = -5.01; y < 15; y += 0.41) {
        const inside = x > 0 && x < 10 && y > 0 && y < 10
        const out = Math.hypot(Math.max(0, -x, x - 10), Math.max(0, -y, y - 10))
        const d = inside ? -Math.min(x, y, 10 - x, 10 - y) : out
        expect(outlineDistance(square, x, y)).toBeCloseTo(Math.max(-4, Math.min(4, d)), 6)
      }
    }
  })
})

describe('stencils and tape', () => {
  it('paint goes through a stencil and stays off what it covers', () => {
    expect(through([[0.5, 0.47], [0.2, 0.47], [0.8, 0.9]], {})).toEqual([1, 0, 0])
    expect(through([[0.5, 0.47], [0.2, 0.47]], { does: 'shields' })).toEqual([0, 1])
  })

  it('half the paint passes on the line itself; a softness inside, five sixths', () => {
    const [U0, V0] = planePlace(minnow.table, 0.5, 0.35)
    const girth = (planePlace(minnow.table, 0.5, 0)[1] - V0) / 0.35
    const [onLine, inside] = through([[0.5, 0.35], [0.5, 0.35 + 0.3 / girth]], { soft: 0.3 })
    expect(U0).toBeCloseTo(toPlane(minnow, 0.5, 0.35).U, 1)
    expect(onLine).toBeCloseTo(0.5, 1)
    expect(inside).toBeCloseTo(0.84, 1)
  })

  it('turned over for the other flank it is out of register by no more than a quarter of a millimetre', () => {
    const far = 1.2 / 90
    expect(through([[0.5, 0.47, -1], [0.4 + far, 0.47, -1], [0.4 - far, 0.47, -1]], { soft: 0.05 })).toEqual([1, 1, 0])
  })

  it('an outline laid over the back is whole on the ridge', () => {
    const over: Place[] = [[0.4, -0.2], [0.5, -0.2], [0.5, 0.3], [0.4, 0.3]]
    const upTo: Place[] = [[0.4, 0.0], [0.5, 0.0], [0.5, 0.3], [0.4, 0.3]]
    expect(through([[0.45, 0.001], [0.45, 0.1]], { outlines: [over], soft: 0.5 }).map(one => Math.round(one * 100))).toEqual([100, 100])
    expect(through([[0.45, 0.001, -1]], { outlines: [over], soft: 0.5 })[0]).toBeCloseTo(1, 2)
    expect(through([[0.45, 0.1]], { outlines: [upTo], soft: 0.1 })[0]).toBeCloseTo(1, 2)
  })
})

describe('strokes', () => {
  it('a line of the airbrush holds width · √2π across it', () => {
    const { at } = strokeField([{ points: [[0, 0], [20, 0]], width: [0.6, 0.6], amount: [1, 1] }], 'airbrush')
    let sum = 0
    for (let V = -4; V < 4; V += 0.01) sum += at(10, V) * 0.01
    expect(sum).toBeCloseTo(0.6 * Math.sqrt(2 * Math.PI), 3)
  })

  it('strokes of the gun add up where they cross, those of a brush cover', () => {
    const crossed = [
      { points: [[0, 0], [20, 0]], width: [1, 1], amount: [0.8, 0.8] },
      { points: [[10, -9], [10, 9]], width: [1, 1], amount: [0.8, 0.8] },
    ] as const
    expect(strokeField(crossed, 'airbrush').at(10, 0)).toBeCloseTo(1.6, 6)
    expect(strokeField(crossed, 'brush').at(10, 0)).toBeCloseTo(0.8, 6)
  })

  it('a bend in a line lays no more than its straight part', () => {
    const { at } = strokeField([{ points: [[0, 0], [5, 0], [5, 5]], width: [0.5, 0.5], amount: [1, 1] }], 'airbrush')
    expect(at(5, 0)).toBeCloseTo(1, 6)
  })

  it('a dagger runs from thick to thin', () => {
    const { at } = strokeField([{ points: [[0, 10], [0, 0]], width: [1.25, 0.25], amount: [1.1, 0.5] }], 'airbrush')
    expect(at(1, 9.5)).toBeGreaterThan(0.7)
    expect(at(1, 0.5)).toBeLessThan(0.02)
  })
})

describe('marks on a body', () => {
  const view = seen(minnow, 320)
  const laid = (mark: object) => {
    const keep = depositKeep(view, minnow)
    const out = new Float32Array(view.count)
    layMarks(keep, [Mark.parse(mark)], 1, out)
    return out
  }
  const scatter = { kind: 'scatter', seed: 3, count: 60, u: [0.25, 0.9], v: [0.2, 0.7], radius: [0.6, 0.9], apart: 3 }

  it('a halo lies round its dots: the same seed scatters alike, whatever the dots grow by', () => {
    const [dots, halo] = [laid(scatter), laid({ ...scatter, grow: 0.6 })]
    dots.forEach((dot, i) => expect(halo[i] ?? 0).toBeGreaterThanOrEqual(dot - 1e-6))
    expect(laid({ ...scatter, seed: 4 })).not.toEqual(dots)
  })

  it('a wide soft line beside the ridge runs on over the back without a step', () => {
    const ring = [1, -1].flatMap(side => Array.from({ length: 300 }, (_, k) => [0.45, 0.001 + 0.0016 * (side > 0 ? 299 - k : k), side as 1 | -1] as const))
    const keep = depositKeep(samplesAt(minnow, ring), minnow)
    const out = new Float32Array(ring.length)
    layMarks(keep, [Mark.parse({
      kind: 'strokes', with: 'airbrush', strokes: [{ points: [[0.3, 0.12], [0.6, 0.12]], width: [4, 4], amount: [1, 1] }],
    })], 1, out)
    for (let k = 1; k < out.length; k++) expect(Math.abs((out[k] ?? 0) - (out[k - 1] ?? 0))).toBeLessThan(0.01)
    expect(out[299]).toBeGreaterThan(1.2)
  })

  it('a worm track is about as wide as it says, and tracks cover part of the back', () => {
    const worms = laid({ kind: 'worm tracks', seed: 2, wavelength: 3.1, width: 0.62 })
    const cover = worms.reduce((a, b) => a + b, 0) / view.count
    expect(cover).toBeGreaterThan(0.15)
    expect(cover).toBeLessThan(0.5)
  })

  it('a higher threshold leaves less sponge', () => {
    const cover = [-0.2, 0, 0.2].map((threshold) => {
      const map = laid({ kind: 'torn sponge', seed: 2, size: 4, threshold, soft: 0.05 })
      return map.reduce((a, b) => a + b, 0) / view.count
    })
    expect(cover[0]).toBeGreaterThan(0.7)
    expect(cover[1]).toBeCloseTo(0.5, 0)
    expect(cover[2]).toBeLessThan(0.3)
  })

  it('a fan spreads below the axis toward the tail and lays no more than a hand would at its root', () => {
    const fan = laid({ kind: 'fan', root: [0.3, 0.6], count: 9, length: [12, 11], angle: [6, 54], width: [0.45, 0.68], amount: [0.7, 0.34] })
    expect(Math.max(...fan)).toBeLessThan(1.5)
    expect(Math.max(...fan)).toBeGreaterThan(0.6)
    fan.forEach((amount, i) => {
      if (amount > 0.2) {
        expect(view.u[i]).toBeGreaterThan(0.28)
        expect(view.v[i]).toBeGreaterThan(0.55)
      }
    })
  })
})
