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
  bench ??= pictureBench('orders')
  const { width, height, rgba } = bench.draw(look, wish)
  return { width, height, rgba }
}
