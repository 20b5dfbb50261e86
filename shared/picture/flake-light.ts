import { FLAKE_TABLE_COSINES } from '#shared/optics/flake-table'
import { BANDS, type CoatTable, type FlakeLevels } from './coat-table'
import type { LaidTable } from './compose'
import type { Mirroring, SampleLight } from './engine/sample-light'
import type { SeenLight } from './engine/seen-daylight'

/** A glint takes no more than this from the light of the flakes round it. */
export const GLINT_LEAST = 0.15
const ROWS = FLAKE_TABLE_COSINES.length
const LOWEST_COSINE = FLAKE_TABLE_COSINES.at(-1)!
/** So little that a number of single precision still tells it. */
const JUST = 1e-5
/** Samples worked through at a time. */
const BLOCK = 256

/**
 * Adds what flakes mirror to the light of the samples, from the top coat down.
 *
 * A lamp lights flakes where they lie: their light is moved from all sides to where they mirror it to the eye, weakened by
 * the coats above. Below the lowest coat of flakes there is nothing to do.
 *
 * @param out linear sRGB, three per sample
 */
export function addFlakeLight(coats: readonly LaidTable[], count: number, { reflected }: SeenLight, sample: SampleLight, out: Float32Array): void {
  const lowest = coats.findIndex(({ table }) => table.flake)
  if (lowest < 0) return
  const reaching = new Float64Array(BLOCK * BANDS)
  for (let from = 0; from < count; from += BLOCK) {
    const size = Math.min(BLOCK, count - from)
    reaching.fill(1)
    for (let c = coats.length - 1; c >= lowest; c--) {
      const { codes, table } = coats[c]!
      if (table.flake) mirrorBlock(codes, table.empty, table.flake, from, size, sample.mirroring(table.flake), sample.light, reaching, reflected, out)
      if (c > lowest) weaken(codes, table, from, size, reaching)
    }
  }
}

function weaken(codes: Uint8Array, { through, empty }: CoatTable, from: number, size: number, reaching: Float64Array): void {
  for (let i = 0; i < size; i++) {
    const code = codes[from + i]!
    if (code <= empty) continue
    for (let b = 0; b < BANDS; b++) reaching[i * BANDS + b]! *= through[code * BANDS + b]!
  }
}

/** Where between the rows of a table of flakes a cosine lies: from 0 to just before the last row. */
export function mirroringPlace(cosine: number): number {
  return Math.min(ROWS - 1 - JUST, Math.max(0, (1 - cosine) / (1 - LOWEST_COSINE) * (ROWS - 1)))
}

function mirrorBlock(
  codes: Uint8Array, empty: number, { mirrored, diffuse }: FlakeLevels, from: number, size: number,
  { strength, place }: Mirroring, light: Float32Array, reaching: Float64Array, reflected: ArrayLike<number>, out: Float32Array,
): void {
  for (let i = 0; i < size; i++) {
    const code = codes[from + i]!
    if (code <= empty) continue
    const gain = strength[from + i]!, row = Math.floor(place[from + i]!), between = place[from + i]! - row, lit = light[from + i]!
    const here = (code * ROWS + row) * BANDS, even = code * BANDS, above = i * BANDS
    let red = 0, green = 0, blue = 0
    for (let b = 0; b < BANDS; b++) {
      const near = mirrored[here + b]!
      const seen = reaching[above + b]! * (gain * (near + between * (mirrored[here + BANDS + b]! - near)) - lit * diffuse[even + b]!)
      red += reflected[b]! * seen
      green += reflected[BANDS + b]! * seen
      blue += reflected[2 * BANDS + b]! * seen
    }
    const at = 3 * (from + i)
    out[at]! += red
    out[at + 1]! += green
    out[at + 2]! += blue
  }
}
