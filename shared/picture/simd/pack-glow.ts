import { PICTURE_BAND_WIDTHS } from '#shared/optics/to-picture-bands'
import { BANDS, LEVELS, type CoatTable } from '../coat-table'
import type { LaidTable } from '../compose'
import type { SeenLight } from '../engine/seen-daylight'
import type { SimdMemory } from './simd-memory'

/** Bytes of what lies at a sample: three rows and a head for each coat, as glow.as counts them, and four rows before. */
const PLACE_BYTES = 4 * 64, ROOM_BYTES = 4 * 64

/** Coats and light in the module's memory, as `glow` asks for them. */
export interface PackedGlow {
  layers: number
  glowing: number
  glowingCount: number
  changed: number
  rows: number
  room: number
}

/** Packs what coats give off for one picture. */
export function glowPacker(): (memory: SimdMemory, coats: readonly LaidTable[], changed: readonly LaidTable[], ground: ArrayLike<number>, seen: SeenLight) => PackedGlow {
  const packed = new WeakMap<CoatTable, { table: Float32Array, glow: Float32Array | undefined }>()

  return (memory, coats, changed, ground, { photons, given, surface }) => {
    const layers = coats.map(({ codes, table }) => {
      const { table: rows, glow } = packedTable(table)
      return [memory.put(codes), memory.put(rows), table.empty, glow ? memory.put(glow) : 0]
    })
    const glowing = layers.filter((_, c) => coats[c]!.table.glow)
    const entering = photons.map(each => (1 - surface.outside) * each)
    return {
      layers: memory.put(Int32Array.from(layers.flat())),
      glowing: memory.put(Int32Array.from(glowing.flat())),
      glowingCount: glowing.length,
      changed: memory.put(Int32Array.from(changed.flatMap(({ codes, table }) => [memory.put(codes), 0, table.empty, 0]))),
      rows: memory.put(Float32Array.from([...entering, ...PICTURE_BAND_WIDTHS, ...given, ...Array.from({ length: BANDS }, (_, b) => ground[b]!)])),
      room: memory.room(ROOM_BYTES + coats.length * PLACE_BYTES),
    }
  }

  function packedTable(table: CoatTable): { table: Float32Array, glow: Float32Array | undefined } {
    const found = packed.get(table) ?? {
      table: inRows(table.R, table.T),
      glow: table.glow && inRows(table.glow.takes, table.glow.back, table.glow.onward),
    }
    packed.set(table, found)
    return found
  }
}

/** Tables of 16 a level as rows of one table. */
function inRows(...tables: Float32Array[]): Float32Array {
  const out = new Float32Array(LEVELS * tables.length * BANDS)
  for (let level = 0; level < LEVELS; level++) {
    tables.forEach((rows, row) => out.set(rows.subarray(level * BANDS, (level + 1) * BANDS), (level * tables.length + row) * BANDS))
  }
  return out
}
