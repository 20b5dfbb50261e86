import type { SurfaceTable } from '#shared/blank/surface-table'
import type { Mark } from '#shared/scheme/mark'
import { binAt, binned } from './bins'
import { hashShare } from './noise'
import { normalShare } from './normal-share'
import type { PlaneField } from './plane-field'
import { planePlace } from './plane-place'

/** A dot on the flat surface, mm; `turn` gives each its own lopsided form. */
export interface PlaneDot { U: number, V: number, radius: number, turn: number }

const TRIES_PER_DOT = 40

/** Dots with an edge `soft` mm wide, none quite round. They cover each other. */
export function dotField(dots: readonly PlaneDot[], soft: number): PlaneField {
  const boxes: number[] = []
  for (const { U, V, radius } of dots) {
    const reach = 1.12 * Math.max(0, radius) + 4 * soft
    boxes.push(U - reach, V - reach, U + reach, V + reach)
  }
  const bins = binned(boxes)
  const numbers = Float64Array.from(dots.flatMap(({ U, V, radius, turn }) => [U, V, radius, turn]))
  const at = (U: number, V: number) => {
    const bin = binAt(bins, U, V)
    if (bin < 0) return 0
    let most = 0
    const end = bins.start[bin + 1] ?? 0
    for (let k = bins.start[bin] ?? 0; k < end; k++) {
      const s = 4 * (bins.items[k] ?? 0)
      const dx = U - (numbers[s] ?? 0)
      const dy = V - (numbers[s + 1] ?? 0)
      const radius = numbers[s + 2] ?? 0
      const d = Math.sqrt(dx * dx + dy * dy)
      if (radius <= 0 || d > 1.12 * radius + 4 * soft) continue
      const angle = Math.atan2(dy, dx) + (numbers[s + 3] ?? 0)
      most = Math.max(most, normalShare((radius * (1 + 0.07 * Math.sin(2 * angle) + 0.05 * Math.sin(3 * angle)) - d) / soft))
    }
    return most
  }
  return { at, meets: 'cover' }
}

/** Dots put down by hand, on one flank. */
export function placedDots(table: SurfaceTable, mark: Extract<Mark, { kind: 'dots' }>, side: 1 | -1): PlaneDot[] {
  return mark.dots.map(([u, v, radius], i) => {
    const [U, V] = planePlace(table, u, v)
    return { U, V, radius: radius + mark.grow, turn: 2 * Math.PI * hashShare(i, side, 613) }
  })
}

/**
 * Dots scattered over a range of shares, none nearer to another than `apart` mm, as many as fit. The same seed scatters alike,
 * whatever the dots grow by: a halo lies round its dot. Each flank has its own.
 */
export function scatteredDots(table: SurfaceTable, mark: Extract<Mark, { kind: 'scatter' }>, side: 1 | -1): PlaneDot[] {
  const dots: PlaneDot[] = []
  const seed = mark.seed ^ (side > 0 ? 0x1d872b41 : 0x68e31da4)
  const cell = Math.max(0.5, mark.apart)
  const taken = new Map<string, PlaneDot[]>()
  for (let k = 0; k < TRIES_PER_DOT * mark.count && dots.length < mark.count; k++) {
    const within = (range: readonly [number, number], use: number) => range[0] + (range[1] - range[0]) * hashShare(k, use, seed)
    const [U, V] = planePlace(table, within(mark.u, 1), within(mark.v, 2))
    const [column, row] = [Math.floor(U / cell), Math.floor(V / cell)]
    if (isCrowded(taken, column, row, U, V, mark.apart)) continue
    const dot = { U, V, radius: within(mark.radius, 3) + mark.grow, turn: 2 * Math.PI * hashShare(k, 4, seed) }
    dots.push(dot)
    const key = `${column},${row}`
    const there = taken.get(key)
    if (there) there.push(dot)
    else taken.set(key, [dot])
  }
  return dots
}

function isCrowded(taken: ReadonlyMap<string, PlaneDot[]>, column: number, row: number, U: number, V: number, apart: number): boolean {
  for (let dc = -1; dc <= 1; dc++) {
    for (let dr = -1; dr <= 1; dr++) {
      for (const dot of taken.get(`${column + dc},${row + dr}`) ?? []) {
        if (Math.hypot(dot.U - U, dot.V - V) < apart) return true
      }
    }
  }
  return false
}
