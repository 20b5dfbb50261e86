import { describe, expect, it } from 'vitest'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { newSection, profileOf, tOfShare } from '#shared/blank/profile'
import { newSurfacePoint, surfacePoint } from '#shared/blank/surface-point'
import { fromPlane, placeAt, placeInSideView, placeOnSurface, toPlane } from '#shared/blank/surface-coordinates'

const NAMES = ['minnow-90', 'deep-crank-62', 'flat-crank-60', 'glide-160'] as const
const blanks = new Map(NAMES.map(name => [name, prepareBlank(builtInBlank(name))]))
const blank = (name: typeof NAMES[number]) => blanks.get(name) ?? prepareBlank(builtInBlank(name))

type Vector = readonly [number, number, number]
const minus = (a: Vector, b: Vector): Vector => [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
const size = (a: Vector) => Math.hypot(...a)
const dot = (a: Vector, b: Vector) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2]

/** Points of the exact surface, without any table. */
function pointOf(name: typeof NAMES[number]) {
  const profile = profileOf(builtInBlank(name))
  const section = newSection()
  const point = newSurfacePoint()
  return (t: number, phi: number) => {
    profile.section(t, section)
    surfacePoint(section, phi, point)
    return { p: [section.x, point.y, point.z] as Vector, n: [point.nx, point.ny, point.nz] as Vector }
  }
}

describe.each(NAMES)('the skin of %s', (name) => {
  const at = pointOf(name)
  it('has the normals of finite differences', () => {
    const h = 1e-5
    for (const t of [0.05, 0.21, 0.4, 0.63, 0.88]) {
      for (const phi of [0.2, 0.9, Math.PI / 2, 2.1, 3, 4, 5.5]) {
        const { n } = at(t, phi)
        const along = minus(at(t + h, phi).p, at(t - h, phi).p)
        const round = minus(at(t, phi + h).p, at(t, phi - h).p)
        expect(Math.abs(dot(n, along)) / size(along)).toBeLessThan(1e-6)
        expect(Math.abs(dot(n, round)) / size(round)).toBeLessThan(1e-6)
        expect(size(n)).toBeCloseTo(1, 12)
      }
    }
  })
  it('looks outward everywhere', () => {
    for (const t of [0.02, 0.3, 0.6, 0.97]) {
      expect(at(t, 0.01).n[1]).toBeGreaterThan(0)
      expect(at(t, Math.PI / 2).n[2]).toBeGreaterThan(0)
      expect(at(t, Math.PI - 0.01).n[1]).toBeLessThan(0)
      expect(at(t, 1.5 * Math.PI).n[2]).toBeLessThan(0)
    }
  })
  it('bends without a jump at its stations', () => {
    const profile = profileOf(builtInBlank(name))
    const d = 1e-4
    const section = newSection()
    const second = (t: number, key: 'h' | 'w' | 'c' | 'n' | 'g') => {
      const value = [t - d, t, t + d].map((place) => {
        profile.section(place, section)
        return section[key]
      })
      return ((value[0] ?? 0) - 2 * (value[1] ?? 0) + (value[2] ?? 0)) / (d * d)
    }
    for (const knot of profile.knots.slice(1, -1)) {
      for (const key of ['h', 'w', 'c', 'n', 'g'] as const) {
        // Curvature runs straight within a gap: carried on to the knot from both sides it has to meet.
        const before = 1.5 * second(knot - 2 * d, key) - 0.5 * second(knot - 6 * d, key)
        const after = 1.5 * second(knot + 2 * d, key) - 0.5 * second(knot + 6 * d, key)
        expect(Math.abs(after - before)).toBeLessThan(1e-5 * (20 + Math.abs(before)))
      }
    }
  })
  it('is measured in millimetres by U along meridians and V round the girth', () => {
    const h = 1e-4
    for (const t of [0.17, 0.3, 0.5, 0.71, 0.83]) {
      for (const phi of [0.3, 0.8, 1.5, 2.2, 2.9]) {
        const [a, b] = [placeAt(blank(name), t - h, phi, 1), placeAt(blank(name), t + h, phi, 1)]
        expect(Math.abs(size(minus(b.position, a.position)) / (b.U - a.U) - 1)).toBeLessThan(1e-3)
        const [c, d] = [placeAt(blank(name), t, phi - h, 1), placeAt(blank(name), t, phi + h, 1)]
        expect(Math.abs(size(minus(d.position, c.position)) / (c.V - d.V) - 1)).toBeLessThan(1e-3)
      }
    }
  })
  it('finds a place again from its shares, its millimetres and the side view', () => {
    for (const [u, v, side] of [[0.1, 0.3, 1], [0.42, 0.5, -1], [0.7, 0.82, 1], [0.93, 0.1, -1]] as const) {
      const place = placeOnSurface(blank(name), u, v, side)
      expect(place.u).toBeCloseTo(u, 6)
      expect(place.v).toBeCloseTo(v, 6)
      expect(Math.sign(place.position[2])).toBe(side)
      expect(dot(place.normal, place.toTail)).toBeCloseTo(0, 9)
      const flat = toPlane(blank(name), u, v)
      expect(flat.U).toBeCloseTo(place.U, 6)
      expect(flat.V).toBeCloseTo(place.V, 6)
      expect(size(minus(fromPlane(blank(name), flat.U, flat.V, side).position, place.position))).toBeLessThan(1e-3)
      const seen = placeInSideView(blank(name), place.position[0], place.position[1], side)
      expect(size(minus(seen.position, place.position))).toBeLessThan(1e-4)
    }
  })
  it('puts back, widest line and belly at 0, ½ and 1', () => {
    const section = newSection()
    blank(name).profile.section(0.5, section)
    const u = placeAt(blank(name), 0.5, Math.PI / 2, 1).u
    expect(placeOnSurface(blank(name), u, 0, 1).position[1]).toBeCloseTo(section.c + section.h, 3)
    expect(placeOnSurface(blank(name), u, 0.5, 1).position[2]).toBeCloseTo(section.w, 6)
    expect(placeOnSurface(blank(name), u, 1, 1).position[1]).toBeCloseTo(section.c - section.h, 3)
    expect(placeOnSurface(blank(name), 0, 0.5, 1).position[0]).toBeCloseTo(0, 3)
    expect(placeOnSurface(blank(name), 1, 0.5, 1).position[0]).toBeCloseTo(builtInBlank(name).length, 3)
  })
})

interface Weighted { value: number, weight: number }

/** Largest and smallest stretch of a small circle of the flat (a, b) map laid on the skin, weighted by area. */
function stretches(name: typeof NAMES[number], map: (t: number, phi: number) => readonly [number, number]): { large: Weighted[], small: Weighted[] } {
  const at = pointOf(name)
  const d = 2e-5
  const [t0, t1] = [tOfShare(0.06), tOfShare(0.94)]
  const large: Weighted[] = []
  const small: Weighted[] = []
  for (let i = 0; i < 60; i++) {
    for (let k = 0; k < 60; k++) {
      const [t, phi] = [t0 + (t1 - t0) * (i + 0.5) / 60, Math.PI * (k + 0.5) / 60]
      const along = minus(at(t + d, phi).p, at(t - d, phi).p)
      const round = minus(at(t, phi + d).p, at(t, phi - d).p)
      const [m1, m0, n1, n0] = [map(t + d, phi), map(t - d, phi), map(t, phi + d), map(t, phi - d)]
      const [a, c, b, e] = [m1[0] - m0[0], m1[1] - m0[1], n1[0] - n0[0], n1[1] - n0[1]]
      const det = a * e - b * c
      // The metric of the skin in the flat map's own millimetres.
      const p = [0, 1, 2].map(j => ((along[j] ?? 0) * e - (round[j] ?? 0) * c) / det)
      const q = [0, 1, 2].map(j => ((round[j] ?? 0) * a - (along[j] ?? 0) * b) / det)
      const [E, F, G] = [[p, p], [p, q], [q, q]].map(([x, y]) => (x ?? []).reduce((sum, value, j) => sum + value * (y?.[j] ?? 0), 0)) as [number, number, number]
      const root = Math.sqrt(((E - G) / 2) ** 2 + F * F)
      const weight = Math.hypot(
        along[1] * round[2] - along[2] * round[1], along[2] * round[0] - along[0] * round[2], along[0] * round[1] - along[1] * round[0],
      )
      large.push({ value: Math.sqrt((E + G) / 2 + root), weight })
      small.push({ value: Math.sqrt(Math.max(0, (E + G) / 2 - root)), weight })
    }
  }
  return { large, small }
}

function quantile(list: Weighted[], share: number): number {
  const total = list.reduce((sum, one) => sum + one.weight, 0)
  let below = 0
  const found = list.sort((a, b) => a.value - b.value).find((one) => {
    below += one.weight
    return below >= share * total
  })
  return found?.value ?? Number.NaN
}

describe('a mask laid flat in U and V', () => {
  it.each([
    ['minnow-90', 1.02, 1.10, 0.90], ['deep-crank-62', 1.05, 1.26, 0.79], ['flat-crank-60', 1.02, 1.20, 0.83], ['glide-160', 1.02, 1.15, 0.86],
  ] as const)('is hardly stretched on %s', (name, median, most, least) => {
    const { large, small } = stretches(name, (t, phi) => {
      const { U, V } = placeAt(blank(name), t, phi, 1)
      return [U, V]
    })
    expect(Math.abs(quantile(large, 0.5) - median)).toBeLessThan(0.01)
    expect(Math.abs(quantile(large, 0.95) - most)).toBeLessThan(0.02)
    expect(Math.abs(quantile(small, 0.05) - least)).toBeLessThan(0.01)
  })
  it('is far better than one laid on the side view', () => {
    const at = pointOf('minnow-90')
    const { large } = stretches('minnow-90', (t, phi) => [at(t, phi).p[0], at(t, phi).p[1]])
    expect(Math.abs(quantile(large, 0.5) - 1.19)).toBeLessThan(0.01)
    expect(quantile(large, 0.95)).toBeGreaterThan(8)
  })
})
