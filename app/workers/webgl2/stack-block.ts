import type { KeyedCoat } from '#shared/picture/view-kit'
import { COATS_MOST } from './stack-source'

/** Where the parts of the coats lie on the graphics processor: a layer for each coat, and for each coat of flakes. */
export interface CoatLayers { codes: readonly number[], films: readonly number[], flakes: readonly number[], mirrorings: readonly number[] }

/**
 * The block of uniforms that tells the program of its coats, from the ground up, four numbers each.
 *
 * @throws {RangeError} when there are more coats than it has room for
 */
export function stackBlock(coats: readonly KeyedCoat[], { codes, films, flakes, mirrorings }: CoatLayers): Int32Array {
  if (coats.length > COATS_MOST) throw new RangeError(`${coats.length} coats are more than ${COATS_MOST}`)
  const block = new Int32Array(4 * COATS_MOST)
  let flake = 0
  coats.forEach(({ table }, c) => {
    const both = table.flake ? flakes[flake]! | mirrorings[flake]! << 16 : -1
    block.set([codes[c]!, films[c]!, table.empty, both], 4 * c)
    if (table.flake) flake++
  })
  return block
}
