import { BANDS, type CoatTable } from './coat-table'

/** One coat as it lies in a picture: how thick over each sample, and what each thickness does to light. */
export interface LaidTable {
  /** One code per sample. */
  codes: Uint8Array
  table: CoatTable
}

/** Samples worked through at a time, so that their state stays in the processor's nearest memory. */
const BLOCK = 256

/** Reflectance of a bare ground under every sample. */
export function bareGround(count: number, ground: ArrayLike<number>): Float32Array {
  const state = new Float32Array(count * BANDS)
  for (let i = 0; i < count; i++) state.set(ground, i * BANDS)
  return state
}

/**
 * Lays coats over grounds, sample by sample: 16 bands each, inside the film.
 *
 * The state is a fraction N/D, so that a whole stack costs one division. `out` may be `ground`.
 *
 * @param ground reflectance under the lowest coat, 16 per sample
 */
export function layCoats(coats: readonly LaidTable[], ground: Float32Array, out: Float32Array = new Float32Array(ground.length)): Float32Array {
  const count = ground.length / BANDS
  const N = new Float64Array(BLOCK * BANDS), D = new Float64Array(BLOCK * BANDS)
  for (let from = 0; from < count; from += BLOCK) {
    const size = Math.min(BLOCK, count - from)
    for (let i = 0; i < size * BANDS; i++) {
      N[i] = ground[from * BANDS + i]!
      D[i] = 1
    }
    for (const { codes, table } of coats) layBlock(codes, table, from, size, N, D)
    for (let i = 0; i < size * BANDS; i++) out[from * BANDS + i] = N[i]! / D[i]!
  }
  return out
}

function layBlock(codes: Uint8Array, { R, Q, empty }: CoatTable, from: number, size: number, N: Float64Array, D: Float64Array): void {
  for (let i = 0; i < size; i++) {
    const code = codes[from + i]!
    if (code <= empty) continue
    const level = code * BANDS, at = i * BANDS
    for (let b = 0; b < BANDS; b++) {
      const n = N[at + b]!, d = D[at + b]!, r = R[level + b]!
      N[at + b] = r * d + Q[level + b]! * n
      D[at + b] = d - r * n
    }
  }
}
