import type { PictureEngine } from '#shared/picture/engine/picture-engine'
import { plainEngine } from '#shared/picture/engine/plain-engine'
import { simdEngine } from '#shared/picture/engine/simd-engine'
import { steadyEngine } from '#shared/picture/engine/steady-engine'
import type { Look } from '#shared/picture/look'
import { pictureBench, type PictureBench } from '#shared/picture/picture-bench'
import type { PictureWish } from '#shared/picture/picture-options'

/** What a painting thread is asked for. */
export interface PictureJob { look: Look, wish: PictureWish }

/** Bytes of a painted picture, four a pixel. */
export interface PaintedPicture { width: number, height: number, rgba: Uint8ClampedArray<ArrayBuffer> }

let bench: PictureBench | undefined

/** Paints one picture. Each thread keeps its bench, so that pictures of one blank, or in one light, share what they can. */
export default function paintPicture({ look, wish }: PictureJob): PaintedPicture {
  bench ??= pictureBench('orders', quickest())
  const { width, height, rgba } = bench.draw(look, wish)
  return { width, height, rgba }
}

/** Vectors where the machine has them; should they fail, the same picture is painted without. */
function quickest(): PictureEngine {
  const vectors = simdEngine()
  return vectors ? steadyEngine([vectors, plainEngine()]) : plainEngine()
}
