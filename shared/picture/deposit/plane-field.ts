import type { DepositKeep } from './keep'

/** Something drawn on the flat surface: its share or amount at a place (U, V), mm, and how far from its own lines it is felt. */
export interface PlaneField {
  at: (U: number, V: number) => number
  /** What crosses the ridge from the other side adds up (strokes of a gun) or covers (cut edges, dots). */
  meets: 'add' | 'cover'
}

/** Nearer to a ridge than this, mm, the other side's drawing is looked at too. */
const RIDGE = 6

/**
 * Evaluates what is drawn on the left and on the right flank at every sample of the body. Drawings that reach over the back or
 * the belly go on on the other side, so no line is left along the ridge.
 */
export function fieldMap(keep: DepositKeep, left: PlaneField, right: PlaneField): Float32Array {
  const { U, V, side } = keep.samples
  const out = new Float32Array(keep.samples.count)
  for (const i of keep.onBody) {
    const isLeft = (side[i] ?? 1) > 0
    const own = isLeft ? left : right
    const other = isLeft ? right : left
    const at = U[i] ?? 0
    const height = V[i] ?? 0
    let value = own.at(at, height)
    const toBack = keep.toBack[i] ?? 0
    const toBelly = (keep.girth[i] ?? 0) - toBack
    if (toBack < RIDGE) value = meet(own.meets, value, other.at(at, height + 2 * toBack))
    if (toBelly < RIDGE) value = meet(own.meets, value, other.at(at, height - 2 * toBelly))
    out[i] = value
  }
  return out
}

function meet(meets: PlaneField['meets'], a: number, b: number): number {
  return meets === 'add' ? a + b : Math.max(a, b)
}
