import { DAYLIGHT_IN_AIR } from '#shared/optics/seen-key'
import type { PictureOptions, PictureWish } from './picture-options'

/** The lamp travels an arc from face to flop: degrees from the gloss direction of a flank that faces the viewer. */
export const TILT_MIN = 15
export const TILT_MAX = 110

/** What a picture shows and how it is lit unless told otherwise. */
export const OPTION_DEFAULTS = {
  roll: 0, nose: 'left', light: 'bench', seen: DAYLIGHT_IN_AIR, upTo: 'all', clear: true, surround: 119, shadow: false, plain: false, quality: 'screen',
} as const

/** A wish with every default filled in. Asks for nothing of the painting thread that would have to be downloaded with it. */
export function fullOptions(wish: PictureWish): PictureOptions {
  const told = Object.fromEntries(Object.entries(wish).filter(([, value]) => value !== undefined))
  return { ...OPTION_DEFAULTS, width: wish.width, height: wish.height, ...told }
}
