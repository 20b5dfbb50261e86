import { TABLE_COLUMNS, TABLE_ROWS, type SurfaceTable } from '#shared/blank/surface-table'
import type { Place } from '#shared/scheme/mark'

/** A place laid out flat, mm: along the meridian from mid-length, round the girth from the widest line toward the back. */
export type PlanePoint = readonly [U: number, V: number]

/** Longest piece of a draped line, mm of arc: a line that is straight in shares bends with the body. */
const PIECE = 3

/**
 * Shares (u, v) as arc lengths. Quick (straight between table places, right to about .02 mm away from the very ends) and, unlike
 * the exact one, it goes on straight past the ridges and past nose and tail, where outlines may run on.
 */
export function planePlace(table: SurfaceTable, u: number, v: number): PlanePoint {
  const wanted = Math.min(1, Math.max(0, u))
  let low = 0
  let high = TABLE_ROWS - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((table.u[middle] ?? 0) <= wanted) low = middle
    else high = middle
  }
  const from = table.u[low] ?? 0
  const f = Math.min(1, Math.max(0, (wanted - from) / ((table.u[high] ?? 1) - from)))
  const row = low * TABLE_COLUMNS
  const next = high * TABLE_COLUMNS
  const at = (values: Float64Array, k: number) => (values[row + k] ?? 0) * (1 - f) + (values[next + k] ?? 0) * f
  const end = v < 0.5 ? at(table.V, 0) : -at(table.V, TABLE_COLUMNS - 1)
  const V = (1 - 2 * v) * end
  // V falls from column to column.
  let first = 0
  let last = TABLE_COLUMNS - 1
  while (last - first > 1) {
    const middle = (first + last) >> 1
    if (at(table.V, middle) >= V) first = middle
    else last = middle
  }
  const a = at(table.V, first)
  const b = at(table.V, last)
  const g = a > b ? Math.min(1, Math.max(0, (a - V) / (a - b))) : 0
  const U = at(table.U, first) * (1 - g) + at(table.U, last) * g
  return [U + (u - wanted) * table.widestLength, V]
}

/** A line draped over the body: its places and enough between them to follow the body, laid out flat. */
export function draped(table: SurfaceTable, places: readonly Place[], isClosed: boolean): PlanePoint[] {
  const points: PlanePoint[] = []
  const count = isClosed ? places.length : places.length - 1
  for (let i = 0; i < count; i++) {
    const [u0, v0] = places[i] ?? [0, 0]
    const [u1, v1] = places[(i + 1) % places.length] ?? [0, 0]
    const [a, b] = [planePlace(table, u0, v0), planePlace(table, u1, v1)]
    const pieces = Math.max(1, Math.ceil(Math.hypot(b[0] - a[0], b[1] - a[1]) / PIECE))
    points.push(a)
    for (let k = 1; k < pieces; k++) points.push(planePlace(table, u0 + (u1 - u0) * k / pieces, v0 + (v1 - v0) * k / pieces))
  }
  const last = places.at(-1)
  if (!isClosed && last) points.push(planePlace(table, ...last))
  return points
}
