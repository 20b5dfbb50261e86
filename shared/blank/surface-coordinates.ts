import type { PreparedBlank } from './prepared-blank'
import { newSection, type Section } from './profile'
import { newSurfacePoint, surfacePoint } from './surface-point'
import {
  fillSurfaceRow, hermite, newSurfaceRow, rowU, rowV, shareOfV, TABLE_COLUMNS, TABLE_ROWS, type SurfaceRow, type SurfaceTable,
} from './surface-table'

/** Which flank: 1 the left, which is shown nose left; -1 the right. */
export type Side = 1 | -1
/** mm in the body frame, or a direction in it. */
export type BodyVector = readonly [x: number, y: number, z: number]

/** A place on the skin in all its coordinates. */
export interface SurfacePlace {
  /** Place along the body and girth angle (0 back, π belly). */
  t: number
  phi: number
  side: Side
  /** Arc lengths, mm: along the meridian from mid-length, round the girth from the widest line. */
  U: number
  V: number
  /** Shares: of the widest meridian from the nose, of the half girth from the back. */
  u: number
  v: number
  position: BodyVector
  /** Outward unit normal. */
  normal: BodyVector
  /** Unit direction along the meridian, toward the tail. */
  toTail: BodyVector
}

const HALVINGS = 48

function bisect(low: number, high: number, isBelow: (at: number) => boolean): number {
  let [a, b] = [low, high]
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (a + b) / 2
    if (isBelow(middle)) a = middle
    else b = middle
  }
  return (a + b) / 2
}

const clamp = (value: number) => Math.min(1, Math.max(0, value))

/** Place t along the body for a share u of the widest meridian. */
export function tOfU(table: SurfaceTable, u: number): number {
  const wanted = clamp(u)
  let low = 0
  let high = TABLE_ROWS - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((table.u[middle] ?? 0) <= wanted) low = middle
    else high = middle
  }
  const d = 1 / (TABLE_ROWS - 1)
  const { u: shares, ut } = table
  const share = bisect(0, 1, f =>
    hermite(shares[low] ?? 0, ut[low] ?? 0, shares[high] ?? 1, ut[high] ?? 0, d, f) < wanted)
  return (low + share) * d
}

/** Girth angle, 0 to π, at which a section has an arc length V. */
export function phiOfV(row: SurfaceRow, V: number): number {
  return bisect(0, Math.PI, phi => rowV(row, phi) > V)
}

function vToV(row: SurfaceRow, v: number): number {
  const share = clamp(v)
  const end = share < 0.5 ? row.V[0] ?? 0 : -(row.V[TABLE_COLUMNS - 1] ?? 0)
  return (1 - 2 * share) * end
}

/** Everything about the place at t and girth angle φ (0 to π) on one side. */
export function placeAt(blank: PreparedBlank, t: number, phi: number, side: Side, row: SurfaceRow = newSurfaceRow()): SurfacePlace {
  // At the very ends all meridians meet and no direction along them is left: stay a hair inside.
  const inside = Math.min(1 - 1e-6, Math.max(1e-6, t))
  const section: Section = newSection()
  const point = newSurfacePoint()
  blank.profile.section(inside, section)
  surfacePoint(section, phi, point)
  fillSurfaceRow(blank.table, inside, row)
  const V = rowV(row, phi)
  const along = Math.hypot(section.xt, point.yt, point.zt)
  return {
    t, phi, side, V, U: rowU(row, phi), u: row.u, v: shareOfV(row, V),
    position: [section.x, point.y, side * point.z],
    normal: [point.nx, point.ny, side * point.nz],
    toTail: [section.xt / along, point.yt / along, side * point.zt / along],
  }
}

/** The place at shares (u, v) on one side: u 0 nose to 1 tail, v 0 back, ½ widest line, 1 belly. Beyond them, the nearest end. */
export function placeOnSurface(blank: PreparedBlank, u: number, v: number, side: Side): SurfacePlace {
  const row = newSurfaceRow()
  const t = tOfU(blank.table, u)
  fillSurfaceRow(blank.table, t, row)
  return placeAt(blank, t, phiOfV(row, vToV(row, v)), side, row)
}

/** Shares (u, v) as arc lengths (U, V), mm: where outlines are laid out flat. */
export function toPlane(blank: PreparedBlank, u: number, v: number): { U: number, V: number } {
  const row = newSurfaceRow()
  fillSurfaceRow(blank.table, tOfU(blank.table, u), row)
  const V = vToV(row, v)
  return { V, U: rowU(row, phiOfV(row, V)) }
}

const PLANE_ROUNDS = 12

/** The place at arc lengths (U, V), mm, on one side; the nearest place on the body when they lie beyond it. */
export function fromPlane(blank: PreparedBlank, U: number, V: number, side: Side): SurfacePlace {
  const row = newSurfaceRow()
  let phi = Math.PI / 2
  let t = 0.5
  for (let round = 0; round < PLANE_ROUNDS; round++) {
    const angle = phi
    t = bisect(0, 1, (at) => {
      fillSurfaceRow(blank.table, at, row)
      return rowU(row, angle) < U
    })
    fillSurfaceRow(blank.table, t, row)
    phi = phiOfV(row, V)
    if (Math.abs(phi - angle) < 1e-9) break
  }
  return placeAt(blank, t, phi, side, row)
}

/** The place on the skin seen at (x, y) mm in the side view; on the outline when (x, y) lies beside the body. */
export function placeInSideView(blank: PreparedBlank, x: number, y: number, side: Side): SurfacePlace {
  const t = Math.acos(Math.min(1, Math.max(-1, 1 - 2 * x / blank.profile.length))) / Math.PI
  const section = newSection()
  const point = newSurfacePoint()
  blank.profile.section(t, section)
  const phi = bisect(0, Math.PI, (angle) => {
    surfacePoint(section, angle, point)
    return point.y > y
  })
  return placeAt(blank, t, phi, side)
}
