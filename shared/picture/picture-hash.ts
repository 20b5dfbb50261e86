import { ENGINE_VERSION } from '#shared/optics/engine-version'
import { canonicalJson } from '#shared/scheme/canonical'
import type { Look } from './look'
import { pictureOptions, type PictureWish } from './picture-options'
import { shownCoats, eyesAreFitted } from './shown-coats'

/** Version of how pictures are drawn; it rises whenever the same look would be drawn visibly otherwise. */
export const PICTURE_VERSION = '3'

/**
 * Everything that decides what a picture shows, as one text to hash for caches; alike for looks that are drawn alike.
 *
 * Names, notes and coats that are not shown do not count.
 */
export function pictureText(look: Look, wish: PictureWish): string {
  const options = pictureOptions(wish)
  const { ground, eyes } = look.body
  return canonicalJson({
    engine: ENGINE_VERSION,
    picture: PICTURE_VERSION,
    // What is shown follows from the coats below, not from the name of the last.
    options: { ...options, upTo: null },
    blank: look.materials.blank.shape,
    ground: { colour: ground.colour, finish: ground.finish },
    eyes: eyesAreFitted(look, options.upTo) ? eyes : null,
    coats: shownCoats(look, options).map(({ placeKey, paint, passes }) => [placeKey, paint, passes]),
  })
}
