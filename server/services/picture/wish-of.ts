import type { PictureWish } from '#shared/picture/picture-options'
import type { PictureQuery } from '#shared/scheme/scheme-input'

/** What a picture that is asked for by its address should show. */
export function wishOf(query: PictureQuery): PictureWish {
  return {
    width: query.width,
    height: query.height ?? Math.round(query.width / 2),
    roll: query.roll,
    nose: query.nose,
    light: typeof query.light === 'number' ? { tilt: query.light } : query.light,
    upTo: query.upTo ?? 'all',
    clear: query.clear,
    surround: query.surround === 'none' ? null : query.surround,
  }
}
