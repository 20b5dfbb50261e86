import type { KeyedCoat } from '#shared/picture/view-kit'
import { COATS_MOST } from './stack-source'

/** Layers on the graphics processor: one for each coat, each coat of flakes, and each that glows, from the ground up. */
export interface CoatLayers {
  codes: readonly number[]
  films: readonly number[]
  flakes: readonly number[]
  mirrorings: readonly number[]
  glows: readonly number[]
}

/**
 * The block of uniforms that tells the program of its coats, from the ground up, four numbers each.
 *
 * @throws {RangeError} when there are more coats than it has room for
 */
export function stackBlock(coats: readonly KeyedCoat[], { codes, films, flakes, mirrorings, glows }: CoatLayers): Int32Array {
  if (coats.length > COATS_MOST) throw new RangeError(`${coats.length} coats are more than ${COATS_MOST}`)
  const block = new Int32Array(4 * COATS_MOST)
  let flake = 0, glow = 0
  coats.forEach(({ table }, c) => {
    block.set([
      codes[c]! | films[c]! << 16,
      table.empty,
      table.flake ? flakes[flake]! | mirrorings[flake++]! << 16 : -1,
      table.glow ? glows[glow++]! : -1,
    ], 4 * c)
  })
  return block
}
