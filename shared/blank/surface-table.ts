import { newSection, type Profile } from './profile'
import { newSurfacePoint, surfacePoint } from './surface-point'

/** Rows along the body (even in t) and columns over the half girth (even in φ, back to belly). */
export const TABLE_ROWS = 257
export const TABLE_COLUMNS = 97
/** Column of the widest line. */
export const WIDEST_COLUMN = (TABLE_COLUMNS - 1) / 2

/**
 * Arc lengths on one half of a body, mm, row by row: V round the girth from the widest line (+ toward the back),
 * U along the meridian from mid-length, and their derivatives by φ and t. The other half is its mirror.
 */
export interface SurfaceTable {
  U: Float64Array
  Ut: Float64Array
  V: Float64Array
  Vf: Float64Array
  /** Share of the widest meridian at each row, and its derivative by t. */
  u: Float64Array
  ut: Float64Array
  /** Length of the widest meridian, mm. */
  widestLength: number
  /** Half the girth, mm, at TABLE_ROWS places even in u. */
  halfGirthByU: Float64Array
}

function meridianSpeed(point: { yt: number, zt: number }, xt: number): number {
  return Math.sqrt(xt * xt + point.yt * point.yt + point.zt * point.zt)
}

/** Measures the arc lengths of a body: Simpson's rule between table places. */
export function surfaceTable(profile: Profile): SurfaceTable {
  const size = TABLE_ROWS * TABLE_COLUMNS
  const [U, Ut, V, Vf] = [new Float64Array(size), new Float64Array(size), new Float64Array(size), new Float64Array(size)]
  const section = newSection()
  const point = newSurfacePoint()
  const dt = 1 / (TABLE_ROWS - 1)
  const df = Math.PI / (TABLE_COLUMNS - 1)
  const between = new Float64Array(TABLE_COLUMNS)
  for (let row = 0; row < TABLE_ROWS; row++) {
    const at = row * TABLE_COLUMNS
    if (row > 0) {
      profile.section((row - 0.5) * dt, section)
      for (let k = 0; k < TABLE_COLUMNS; k++) {
        surfacePoint(section, k * df, point)
        between[k] = meridianSpeed(point, section.xt)
      }
    }
    profile.section(row * dt, section)
    let half = 0
    for (let k = 0; k < TABLE_COLUMNS; k++) {
      if (k > 0) {
        surfacePoint(section, (k - 0.5) * df, point)
        half = Math.hypot(point.yf, point.zf)
      }
      surfacePoint(section, k * df, point)
      const girthSpeed = Math.hypot(point.yf, point.zf)
      // V falls from back to belly; it is shifted to be zero on the widest line below.
      Vf[at + k] = -girthSpeed
      if (k > 0) V[at + k] = (V[at + k - 1] ?? 0) + df * ((Vf[at + k - 1] ?? 0) - 4 * half - girthSpeed) / 6
      Ut[at + k] = meridianSpeed(point, section.xt)
      if (row > 0) {
        const above = at + k - TABLE_COLUMNS
        U[at + k] = (U[above] ?? 0) + dt * ((Ut[above] ?? 0) + 4 * (between[k] ?? 0) + (Ut[at + k] ?? 0)) / 6
      }
    }
    const widest = V[at + WIDEST_COLUMN] ?? 0
    for (let k = 0; k < TABLE_COLUMNS; k++) V[at + k] = (V[at + k] ?? 0) - widest
  }
  const [u, ut] = [new Float64Array(TABLE_ROWS), new Float64Array(TABLE_ROWS)]
  const widestLength = U[size - TABLE_COLUMNS + WIDEST_COLUMN] ?? 1
  for (let row = 0; row < TABLE_ROWS; row++) {
    u[row] = (U[row * TABLE_COLUMNS + WIDEST_COLUMN] ?? 0) / widestLength
    ut[row] = (Ut[row * TABLE_COLUMNS + WIDEST_COLUMN] ?? 0) / widestLength
  }
  const middle = ((TABLE_ROWS - 1) / 2) * TABLE_COLUMNS
  const zero = U.slice(middle, middle + TABLE_COLUMNS)
  for (let i = 0; i < size; i++) U[i] = (U[i] ?? 0) - (zero[i % TABLE_COLUMNS] ?? 0)
  return { U, Ut, V, Vf, u, ut, widestLength, halfGirthByU: halfGirths(u, V) }
}

function halfGirths(u: Float64Array, V: Float64Array): Float64Array {
  const out = new Float64Array(TABLE_ROWS)
  const girth = (row: number) => (V[row * TABLE_COLUMNS] ?? 0) - (V[row * TABLE_COLUMNS + TABLE_COLUMNS - 1] ?? 0)
  let row = 0
  for (let i = 0; i < TABLE_ROWS; i++) {
    const wanted = i / (TABLE_ROWS - 1)
    while (row < TABLE_ROWS - 2 && (u[row + 1] ?? 1) < wanted) row++
    const [a, b] = [u[row] ?? 0, u[row + 1] ?? 1]
    const f = Math.min(1, Math.max(0, (wanted - a) / (b - a)))
    out[i] = girth(row) * (1 - f) + girth(row + 1) * f
  }
  return out
}

/** Half the girth, mm, at a share u of the length. */
export function halfGirth(table: SurfaceTable, u: number): number {
  const at = Math.min(1, Math.max(0, u)) * (TABLE_ROWS - 1)
  const i = Math.min(TABLE_ROWS - 2, Math.floor(at))
  const f = at - i
  return (table.halfGirthByU[i] ?? 0) * (1 - f) + (table.halfGirthByU[i + 1] ?? 0) * f
}

/** Value at share `f` of a step `d` between two places with values a, b and slopes p, q: a cubic that meets all four. */
export function hermite(a: number, p: number, b: number, q: number, d: number, f: number): number {
  const r = 1 - f
  return r * r * ((1 + 2 * f) * a + f * d * p) + f * f * ((1 + 2 * r) * b - r * d * q)
}

/** The table at one place t along the body: what the places of one section share. */
export interface SurfaceRow {
  t: number
  u: number
  U: Float64Array
  V: Float64Array
  Vf: Float64Array
}

/** An empty row to fill. */
export function newSurfaceRow(): SurfaceRow {
  return { t: 0, u: 0, U: new Float64Array(TABLE_COLUMNS), V: new Float64Array(TABLE_COLUMNS), Vf: new Float64Array(TABLE_COLUMNS) }
}

/** Fills `out` with the table at t, 0 to 1. */
export function fillSurfaceRow(table: SurfaceTable, t: number, out: SurfaceRow): void {
  const at = Math.min(1, Math.max(0, t)) * (TABLE_ROWS - 1)
  const row = Math.min(TABLE_ROWS - 2, Math.floor(at))
  const f = at - row
  const d = 1 / (TABLE_ROWS - 1)
  out.t = t
  out.u = hermite(table.u[row] ?? 0, table.ut[row] ?? 0, table.u[row + 1] ?? 0, table.ut[row + 1] ?? 0, d, f)
  for (let k = 0; k < TABLE_COLUMNS; k++) {
    const i = row * TABLE_COLUMNS + k
    const j = i + TABLE_COLUMNS
    out.U[k] = hermite(table.U[i] ?? 0, table.Ut[i] ?? 0, table.U[j] ?? 0, table.Ut[j] ?? 0, d, f)
    out.V[k] = (table.V[i] ?? 0) * (1 - f) + (table.V[j] ?? 0) * f
    out.Vf[k] = (table.Vf[i] ?? 0) * (1 - f) + (table.Vf[j] ?? 0) * f
  }
}

/** U of a row at half-girth angle φ, 0 to π. */
export function rowU(row: SurfaceRow, phi: number): number {
  const at = phi * ((TABLE_COLUMNS - 1) / Math.PI)
  const k = at >= TABLE_COLUMNS - 1 ? TABLE_COLUMNS - 2 : at > 0 ? Math.floor(at) : 0
  const f = at - k
  return (row.U[k] ?? 0) * (1 - f) + (row.U[k + 1] ?? 0) * f
}

/** V of a row at half-girth angle φ, 0 to π. */
export function rowV(row: SurfaceRow, phi: number): number {
  const at = phi * ((TABLE_COLUMNS - 1) / Math.PI)
  const k = at >= TABLE_COLUMNS - 1 ? TABLE_COLUMNS - 2 : at > 0 ? Math.floor(at) : 0
  return hermite(row.V[k] ?? 0, row.Vf[k] ?? 0, row.V[k + 1] ?? 0, row.Vf[k + 1] ?? 0, Math.PI / (TABLE_COLUMNS - 1), at - k)
}

/** Share of the half girth for a V: 0 back, ½ widest line, 1 belly. */
export function shareOfV(row: SurfaceRow, V: number): number {
  const end = V > 0 ? row.V[0] ?? 0 : -(row.V[TABLE_COLUMNS - 1] ?? 0)
  return end > 0 ? 0.5 - 0.5 * V / end : 0.5
}
