import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { TABLE_COLUMNS, type SurfaceRow } from '#shared/blank/surface-table'

/** How much darker the skin is beside the root of a fin, and over how many mm it fades: for a length of 100 mm, and besides. */
const SHADE = { most: 0.3, perHundred: 1.1, least: 0.3, reach: 4 }

/** Light a place of the skin keeps beside the roots of fins, 0-1; (x mm, V mm round the girth) on a row of the table. */
export function rootShade({ shape, fins }: PreparedBlank, row: SurfaceRow, x: number, V: number): number {
  const fade = SHADE.perHundred * shape.length / 100 + SHADE.least
  const isAbove = V > 0
  let toFin = Infinity
  fins.forEach((fin, i) => {
    if (shape.fins[i]?.measuredFrom !== (isAbove ? 'back' : 'belly')) return
    toFin = Math.min(toFin, Math.max(0, fin.rootLeft - x, x - fin.rootRight))
  })
  if (toFin >= SHADE.reach * fade) return 1
  const toRidge = isAbove ? row.V[0]! - V : V - row.V[TABLE_COLUMNS - 1]!
  return 1 - SHADE.most * Math.exp(-Math.hypot(toFin, toRidge) / fade)
}
