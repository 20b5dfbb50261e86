import { describe, expect, it } from 'vitest'
import { bodyMeasures, bodyVolume, sectionArea, sectionGirth, sideArea } from '#shared/blank/body-measures'
import { newSection, profileOf } from '#shared/blank/profile'
import { gamma, gaussLegendre } from '#shared/blank/quadrature'
import { girthPoint, newSurfacePoint } from '#shared/blank/surface-point'
import { ellipsoidStations, evenKnots, evenShares, exactBody, exactEllipsoid } from '../../unit/blank/bodies'

// Closed forms: a prolate spheroid with axes a > b has area 2πb²(1 + (a/b)·asin(e)/e), e = √(1 - b²/a²).
const e = Math.sqrt(1 - 0.04)
const PROLATE = { area: 2 * Math.PI * 100 * (1 + 5 * Math.asin(e) / e), volume: 4 / 3 * Math.PI * 50 * 100 }
const off = (value: number, truth: number) => Math.abs(value / truth - 1)

describe('a prolate spheroid 100 x 20 x 20', () => {
  it('has the area and volume of the closed form', () => {
    expect(PROLATE.area).toBeCloseTo(5019.2510, 3)
    expect(PROLATE.volume).toBeCloseTo(20943.9510, 3)
  })
  // Gaps along the body x nodes in each; errors allowed are ten times those once measured.
  it.each([
    [4, 4, 3e-5, 8e-7], [6, 6, 2e-6, 9e-12], [8, 8, 8e-8, 1e-14], [16, 32, 2e-14, 2e-14],
  ])('is measured from its exact profile with %d gaps of %d nodes', (gaps, nodes, area, volume) => {
    const body = exactEllipsoid(100, 20, 20, evenKnots(gaps))
    expect(off(sideArea(body, { along: nodes, round: 6 }), PROLATE.area)).toBeLessThan(area)
    expect(off(bodyVolume(body, nodes), PROLATE.volume)).toBeLessThan(volume)
  })
  it.each([
    [7, -1.2e-4, -2.2e-4], [9, -3.5e-5, -6.9e-5], [11, -1.4e-5, -2.8e-5], [13, -6.8e-6, -1.3e-5],
  ])('is kept by %d stations to the error of the splines', (count, area, volume) => {
    const body = profileOf({ length: 100, stations: ellipsoidStations(20, 20, evenShares(count)) })
    expect(off(sideArea(body), PROLATE.area)).toBeLessThan(10 * Math.abs(area))
    expect(off(bodyVolume(body), PROLATE.volume)).toBeLessThan(10 * Math.abs(volume))
    // The spline lies a little inside a round body: always too small, never too big.
    expect(sideArea(body)).toBeLessThan(PROLATE.area)
  })
  it('is kept by 11 uneven stations', () => {
    const shares = [0, 0.02, 0.07, 0.15, 0.27, 0.42, 0.58, 0.74, 0.87, 0.96, 1]
    const body = profileOf({ length: 100, stations: ellipsoidStations(20, 20, shares) })
    expect(off(sideArea(body), PROLATE.area)).toBeLessThan(1.3e-4)
    expect(off(bodyVolume(body), PROLATE.volume)).toBeLessThan(2.4e-4)
  })
})

describe('other solids of known size', () => {
  it('measures an ellipsoid 100 x 30 x 20', () => {
    const body = exactEllipsoid(100, 30, 20, evenKnots(12))
    expect(sideArea(body)).toBeCloseTo(6378.945, 2)
    expect(bodyVolume(body)).toBeCloseTo(31415.9265, 3)
  })
  it('measures a ball of radius 10 from 9 stations', () => {
    const size = bodyMeasures(profileOf({ length: 20, stations: ellipsoidStations(20, 20, evenShares(9)) }))
    expect(off(size.area, 1256.637)).toBeLessThan(4.6e-4)
    expect(off(size.volume, 4188.790)).toBeLessThan(6.9e-4)
    expect(size.caps).toBe(0)
  })
  it('measures a frustum R 10, r 5, 40 long, exactly', () => {
    const slope = (t: number) => -5 * Math.PI * Math.sin(Math.PI * t) / 2
    const radius = (t: number) => 10 - 5 * (1 - Math.cos(Math.PI * t)) / 2
    const body = exactBody(40, evenKnots(6), t => ({ h: radius(t), w: radius(t), ht: slope(t), wt: slope(t) }))
    expect(sideArea(body)).toBeCloseTo(1899.624729, 5)
    expect(bodyVolume(body)).toBeCloseTo(7330.382858, 5)
  })
  it('measures a frustum from 7 stations, with its cut ends', () => {
    const stations = evenShares(7).map(s => ({ s, top: 10 - 5 * s, bottom: 5 * s - 10, halfWidth: 10 - 5 * s, exponent: 2, egg: 0 }))
    const size = bodyMeasures(profileOf({ length: 40, stations }))
    expect(off(size.area - size.caps, 1899.624729)).toBeLessThan(2.2e-5)
    expect(off(size.volume, 7330.382858)).toBeLessThan(1.3e-4)
    expect(size.caps).toBeCloseTo(Math.PI * (100 + 25), 6)
  })
  it('knows three sections by Simpson\'s rule are enough for an ellipsoid', () => {
    const body = exactEllipsoid(100, 30, 20, evenKnots(1))
    const section = newSection()
    body.section(0.5, section)
    expect(100 / 6 * 4 * sectionArea(section)).toBeCloseTo(31415.93, 2)
  })
})

describe('a cross-section', () => {
  const boxy = { ...newSection(), h: 15, w: 10, n: 4 }
  const POINTS = 400_000
  const polygon = (section: typeof boxy) => {
    const point = newSurfacePoint()
    let [area, girth] = [0, 0]
    girthPoint(section, 0, point)
    let [y, z] = [point.y, point.z]
    for (let k = 1; k <= POINTS; k++) {
      girthPoint(section, 2 * Math.PI * k / POINTS, point)
      area += (y * point.z - point.y * z) / 2
      girth += Math.hypot(point.y - y, point.z - z);
      [y, z] = [point.y, point.z]
    }
    return { area: Math.abs(area), girth }
  }
  it('has the area and girth of a polygon of 400 000 sides', () => {
    const truth = polygon(boxy)
    expect(off(sectionArea(boxy), truth.area)).toBeLessThan(1e-9)
    expect(off(sectionGirth(boxy, 64), truth.girth)).toBeLessThan(5e-9)
    expect(off(sectionGirth(boxy, 16), truth.girth)).toBeLessThan(6e-6)
  })
  it('keeps its area when the egg lifts its widest line', () => {
    expect(off(polygon({ ...boxy, g: 0.4 * boxy.h }).area, sectionArea(boxy))).toBeLessThan(1e-9)
  })
  it('has Ramanujan\'s girth when it is an ellipse 30 x 20', () => {
    expect(sectionGirth({ ...boxy, n: 2 })).toBeCloseTo(79.327, 3)
  })
})

describe('the numbers behind', () => {
  it('knows gamma at halves and whole numbers', () => {
    expect(off(gamma(1.5), Math.sqrt(Math.PI) / 2)).toBeLessThan(1e-14)
    expect(off(gamma(2), 1)).toBeLessThan(1e-14)
    expect(off(gamma(6), 120)).toBeLessThan(1e-14)
  })
  it('integrates polynomials exactly', () => {
    const { nodes, weights } = gaussLegendre(6)
    expect(nodes.reduce((sum, x, i) => sum + (weights[i] ?? 0) * x ** 11, 0)).toBeCloseTo(1 / 12, 15)
  })
})
