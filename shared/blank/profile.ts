import type { BlankShape } from './blank-shape'
import { cubicSpline, gapOf, splineSlope, splineValue, type SplineEnd } from './spline'

/**
 * The cross-section at one place t along the body, and how it changes with t.
 * At girth angle φ (0 back, π belly): y = c + hρcos φ + g·sin²φ, z = wρ sin φ, ρ = (|cos φ|ⁿ + |sin φ|ⁿ)^(-1/n).
 */
export interface Section {
  t: number
  /** mm from the nose. */
  x: number
  /** Height of the centre, half the height, half the width, mm. */
  c: number
  h: number
  w: number
  /** Section exponent. */
  n: number
  /** Egg lift of the widest line, mm. */
  g: number
  xt: number
  ct: number
  ht: number
  wt: number
  nt: number
  gt: number
}

/** A body as a run of sections; t from 0 (nose) to 1 (tail) is packed toward the ends, so round ends are smooth in it. */
export interface Profile {
  length: number
  /** Places where the sections are given; the curves between them are smooth. */
  knots: readonly number[]
  /** Fills `out` with the section at t. */
  section: (t: number, out: Section) => void
}

/** An empty section to fill. */
export function newSection(): Section {
  return { t: 0, x: 0, c: 0, h: 0, w: 0, n: 2, g: 0, xt: 0, ct: 0, ht: 0, wt: 0, nt: 0, gt: 0 }
}

/** Place along the body for a share of its length: s = (1 - cos πt)/2. */
export function tOfShare(s: number): number {
  return Math.acos(Math.min(1, Math.max(-1, 1 - 2 * s))) / Math.PI
}

/** The body of a shape: splines of continuous curvature through its stations. */
export function profileOf(shape: Pick<BlankShape, 'length' | 'stations'>): Profile {
  const { length, stations } = shape
  const knots = stations.map(station => tOfShare(station.s))
  const values = stations.map(station => ({
    c: (station.top + station.bottom) / 2,
    h: (station.top - station.bottom) / 2,
    w: station.halfWidth,
    n: station.exponent,
    g: station.egg * (station.top - station.bottom) / 2,
  }))
  const ends = (at: 0 | -1): SplineEnd => (values.at(at)?.h === 0 ? 'odd' : 'even')
  const spline = (key: 'c' | 'h' | 'w' | 'n' | 'g', start: SplineEnd, end: SplineEnd) =>
    cubicSpline(knots, values.map(value => value[key]), start, end)
  const [start, end] = [ends(0), ends(-1)]
  const h = spline('h', start, end)
  const w = spline('w', start, end)
  const c = spline('c', 'even', 'even')
  const n = spline('n', 'even', 'even')
  const g = spline('g', 'even', 'even')
  return {
    length,
    knots,
    section(t, out) {
      const i = gapOf(knots, t)
      const d = t - (knots[i] ?? 0)
      out.t = t
      out.x = length * (1 - Math.cos(Math.PI * t)) / 2
      out.xt = length * Math.PI * Math.sin(Math.PI * t) / 2
      out.c = splineValue(c, i, d)
      out.ct = splineSlope(c, i, d)
      // Near a closed end the spline may dip a hair below zero by rounding.
      out.h = Math.max(0, splineValue(h, i, d))
      out.ht = splineSlope(h, i, d)
      out.w = Math.max(0, splineValue(w, i, d))
      out.wt = splineSlope(w, i, d)
      out.n = splineValue(n, i, d)
      out.nt = splineSlope(n, i, d)
      out.g = splineValue(g, i, d)
      out.gt = splineSlope(g, i, d)
    },
  }
}

/** Height of the back line and of the belly line at x mm from the nose; at the ends for x beyond them. */
export function contourAt(profile: Profile, x: number, section: Section = newSection()): { back: number, belly: number, centre: number } {
  profile.section(tOfShare(x / profile.length), section)
  return { back: section.c + section.h, belly: section.c - section.h, centre: section.c }
}
