import { flakeGeometry } from '#shared/optics/flake-angles'
import type { KeyedCoat } from '#shared/picture/view-kit'
import { COATS_MOST } from './stack-source'

/** Bytes of one coat in the block: four whole numbers and four others. */
const EACH = 32

/** Where the parts of the coats lie on the graphics processor; -1 for flakes or lobes there are none of. */
export interface CoatLayers { codes: number[], films: number[], flakes: number[], lobes: number[] }

/** The block of uniforms that tells the program of its coats, from the ground up. */
export function stackBlock(coats: readonly KeyedCoat[], { codes, films, flakes, lobes }: CoatLayers, aspecular: number): ArrayBuffer {
  if (coats.length > COATS_MOST) throw new RangeError(`${coats.length} coats are more than ${COATS_MOST}`)
  const block = new ArrayBuffer(EACH * COATS_MOST)
  coats.forEach(({ table: { empty, flake } }, c) => {
    new Int32Array(block, EACH * c, 4).set([codes[c]!, films[c]!, empty, flakes[c]!])
    if (!flake) return
    // Without a lobe the flakes are read at one angle all over.
    const { gain, cosine } = lobes[c]! < 0 ? flakeGeometry(aspecular, flake.sigma) : { gain: 0, cosine: 1 }
    new Float32Array(block, EACH * c + EACH / 2, 4).set([lobes[c]!, flake.sparkle, gain, cosine])
  })
  return block
}
