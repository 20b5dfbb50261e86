import type { Look } from './look'
import type { Picture, PictureWish } from './picture-options'
import { pictureBench } from './picture-bench'

export type { Look } from './look'
export type { Picture, PictureLight, PictureOptions, PictureWish } from './picture-options'

/**
 * Paints a look: every coat on the blank's own surface, lit by the tent of the bench.
 *
 * One-off; whoever draws the same look again keeps a `pictureBench`.
 */
export function renderLook(look: Look, wish: PictureWish): Picture {
  return pictureBench('orders').draw(look, wish)
}
