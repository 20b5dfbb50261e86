import { BANDS, LEVELS, type CoatTable } from '../coat-table'
import type { LaidTable } from '../compose'
import type { SampleLight } from '../engine/sample-light'
import type { SimdMemory } from './simd-memory'

/** Rows of a level of a coat: R, T² - R², what a ray keeps. */
const PLAIN_ROWS = 3
/** Rows of what uniform coats do together: a, b of N' = aN + bD, c, d of D' = cN + dD, what a ray keeps. */
const JOINED_ROWS = 5
const STEP_WORDS = 8

/** Coats in the module's memory. */
export interface PackedSteps {
  steps: number
  count: number
  /** What uniform coats above the last step do. */
  last: number
}

/** Packs coats for one picture: tables already packed are taken from what the maker of this function keeps. */
export function stepPacker(): (memory: SimdMemory, coats: readonly LaidTable[], sample: SampleLight) => PackedSteps {
  const packed = new WeakMap<CoatTable, Float32Array>()
  const even = new WeakMap<Uint8Array, number>()

  return (memory, coats, sample) => {
    const words: number[] = []
    let below: Float32Array | undefined
    for (const { codes, table } of coats) {
      const code = evenCode(codes)
      if (code >= 0 && !table.flake) {
        if (code > table.empty) below = joined(table, code, below)
        continue
      }
      const { flake } = table
      const mirroring = flake && sample.mirroring(flake)
      words.push(
        memory.put(codes),
        memory.put(below ? joinedTable(table, below) : packedTable(table)), below ? -1 : table.empty, below ? 1 : 0,
        ...flake && mirroring
          ? [memory.put(flake.mirrored), memory.put(flake.diffuse), memory.put(mirroring.strength), memory.put(mirroring.place)]
          : [0, 0, 0, 0],
      )
      below = undefined
    }
    return { steps: memory.put(Int32Array.from(words)), count: words.length / STEP_WORDS, last: memory.put(below ?? NOTHING) }
  }

  function evenCode(codes: Uint8Array): number {
    const found = even.get(codes) ?? (codes.every(code => code === codes[0]) ? codes[0] ?? 0 : -1)
    even.set(codes, found)
    return found
  }

  function packedTable(table: CoatTable): Float32Array {
    const found = packed.get(table) ?? inRows(table)
    packed.set(table, found)
    return found
  }
}

/** What no coat does. */
const NOTHING = Float32Array.from({ length: JOINED_ROWS * BANDS }, (_, i) => [1, 0, 0, 1, 1][Math.floor(i / BANDS)]!)

function inRows({ R, Q, through }: CoatTable): Float32Array {
  const out = new Float32Array(LEVELS * PLAIN_ROWS * BANDS)
  for (let level = 0; level < LEVELS; level++) {
    [R, Q, through].forEach((rows, row) => {
      out.set(rows.subarray(level * BANDS, (level + 1) * BANDS), (level * PLAIN_ROWS + row) * BANDS)
    })
  }
  return out
}

/** A table whose every level has uniform coats under it. */
function joinedTable(table: CoatTable, below: Float32Array): Float32Array {
  const out = new Float32Array(LEVELS * JOINED_ROWS * BANDS)
  for (let level = 0; level < LEVELS; level++) out.set(level > table.empty ? joined(table, level, below) : below, level * JOINED_ROWS * BANDS)
  return out
}

/** One level of a coat over uniform coats. Rows are brought back to a largest of 1: only their ratios count. */
function joined({ R, Q, through }: CoatTable, level: number, below: Float32Array = NOTHING): Float32Array {
  const out = new Float32Array(JOINED_ROWS * BANDS)
  for (let band = 0; band < BANDS; band++) {
    const r = R[level * BANDS + band]!, q = Q[level * BANDS + band]!
    const [a, b, c, d, kept] = [0, 1, 2, 3, 4].map(row => below[row * BANDS + band]!) as [number, number, number, number, number] // five rows
    const rows = [q * a + r * c, q * b + r * d, c - r * a, d - r * b]
    const most = Math.max(...rows.map(Math.abs))
    rows.forEach((value, row) => out[row * BANDS + band] = value / most)
    out[4 * BANDS + band] = kept * through[level * BANDS + band]!
  }
  return out
}
