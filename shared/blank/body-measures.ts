import { newSection, type Profile, type Section } from './profile'
import { gamma, gaussLegendre, type Quadrature } from './quadrature'
import { girthPoint, newSurfacePoint, surfacePoint } from './surface-point'

/** Size of a body without fins, lip and wire. Joints are counted as if they were closed. */
export interface BodyMeasures {
  /** Surface to paint, mm², cut ends included. */
  area: number
  /** The part of it on cut ends, mm². */
  caps: number
  /** mm³. */
  volume: number
  /** Nose to tail; highest back to lowest belly; widest to widest; mm. */
  length: number
  height: number
  width: number
}

/** How finely a body is measured: nodes a station gap along the body, nodes a quarter round it. */
export interface MeasureNodes {
  along: number
  round: number
}

const FINE: MeasureNodes = { along: 6, round: 12 }

/** Area of a cross-section, mm²: 4whΓ(1+1/n)²/Γ(1+2/n), relative error 1e-13. The egg does not change it. */
export function sectionArea(section: Pick<Section, 'h' | 'w' | 'n'>): number {
  return 4 * section.w * section.h * gamma(1 + 1 / section.n) ** 2 / gamma(1 + 2 / section.n)
}

/** Girth of a cross-section, mm, by Gauss-Legendre in each quarter. */
export function sectionGirth(section: Section, nodesPerQuarter = 64): number {
  const { nodes, weights } = gaussLegendre(nodesPerQuarter)
  const point = newSurfacePoint()
  let sum = 0
  for (let quarter = 0; quarter < 4; quarter++) {
    nodes.forEach((node, i) => {
      girthPoint(section, (quarter + node) * Math.PI / 2, point)
      sum += (weights[i] ?? 0) * Math.hypot(point.yf, point.zf)
    })
  }
  return sum * Math.PI / 2
}

function overGaps(profile: Profile, rule: Quadrature, add: (section: Section, weight: number) => void): void {
  const section = newSection()
  profile.knots.forEach((knot, i) => {
    const width = (profile.knots[i + 1] ?? knot) - knot
    if (width === 0) return
    rule.nodes.forEach((node, k) => {
      profile.section(knot + width * node, section)
      add(section, width * (rule.weights[k] ?? 0))
    })
  })
}

/** Skin of the body without cut ends, mm². With the default nodes the splines, not the sums, set the error (1e-6 or better). */
export function sideArea(profile: Profile, nodes: MeasureNodes = FINE): number {
  const round = gaussLegendre(nodes.round)
  const point = newSurfacePoint()
  let area = 0
  overGaps(profile, gaussLegendre(nodes.along), (section, weight) => {
    for (let quarter = 0; quarter < 2; quarter++) {
      round.nodes.forEach((node, k) => {
        surfacePoint(section, (quarter + node) * Math.PI / 2, point)
        area += weight * (round.weights[k] ?? 0) * point.area
      })
    }
  })
  return area * Math.PI
}

/** Volume of the body, mm³, from the closed form of its sections. */
export function bodyVolume(profile: Profile, nodesPerGap = FINE.along): number {
  let volume = 0
  overGaps(profile, gaussLegendre(nodesPerGap), (section, weight) => {
    volume += weight * sectionArea(section) * section.xt
  })
  return volume
}

const EXTENT_STEPS = 400

/** Area, volume and outer sizes of a body. */
export function bodyMeasures(profile: Profile): BodyMeasures {
  const section = newSection()
  let [back, belly, half] = [-Infinity, Infinity, 0]
  for (let i = 0; i <= EXTENT_STEPS; i++) {
    profile.section(i / EXTENT_STEPS, section)
    back = Math.max(back, section.c + section.h)
    belly = Math.min(belly, section.c - section.h)
    half = Math.max(half, section.w)
  }
  const caps = [0, 1].reduce((sum, t) => {
    profile.section(t, section)
    return sum + sectionArea(section)
  }, 0)
  return {
    area: sideArea(profile) + caps,
    caps,
    volume: bodyVolume(profile),
    length: profile.length,
    height: back - belly,
    width: 2 * half,
  }
}
