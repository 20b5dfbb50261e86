import type { DepositKeep } from './keep'

/** Something drawn on the flat surface: its share or amount at a place (U, V), mm, and how far from its own lines it is felt. */
export interface PlaneField {
  at: (U: number, V: number) => number
  /** What crosses the ridge from the other side adds up (strokes of a gun) or covers (cut edges, dots). */
  meets: 'add' | 'cover'
}

/**
 * Evaluates what is drawn on the left and on the right flank at every sample of the body. Drawings that reach over the back or
 * the belly go on on the other side, so no line is left along the ridge.
 */
export function fieldMap(keep: DepositKeep, left: PlaneField, right: PlaneField): Float32Array {
  const { U, V, side } = keep.samples
  const { onBody, toBack, girth } = keep
  const out = new Float32Array(keep.samples.count)
  const adds = left.meets === 'add'
  for (let k = 0; k < onBody.length; k++) {
    const i = onBody[k] ?? 0
    const isLeft = (side[i] ?? 1) > 0
    const own = isLeft ? left : right
    const other = isLeft ? right : left
    const at = U[i] ?? 0
    const height = V[i] ?? 0
    const back = toBack[i] ?? 0
    const here = own.at(at, height)
    // The same place as the other flank counts it: on past the ridge of the back, or past the belly.
    const overBack = other.at(at, height + 2 * back)
    const underBelly = other.at(at, height - 2 * ((girth[i] ?? 0) - back))
    out[i] = adds ? here + overBack + underBelly : Math.max(here, overBack, underBelly)
  }
  return out
}
