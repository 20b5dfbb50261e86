import { encodeChannel } from '#shared/optics/screen-colour'

const ENTRIES = 2048
/** sRGB codes 0-255 over the square root of linear light, which they follow almost straight. */
const CODES = Float32Array.from({ length: ENTRIES + 2 }, (_, i) => 255 * encodeChannel(Math.min(1, (i / ENTRIES) ** 2)))

/** sRGB code, 0-255 and not yet whole, of linear light; within .003 of the formula. */
export function screenCode(linear: number): number {
  if (linear <= 0) return 0
  if (linear >= 1) return 255
  const place = Math.sqrt(linear) * ENTRIES
  const at = place | 0
  return CODES[at]! + (CODES[at + 1]! - CODES[at]!) * (place - at)
}

/** Half the swing of the dither, in steps of the screen. */
const DITHER = 0.45

/** A dither for a pixel, steps of the screen; the same for all three channels, so that greys stay grey. */
export function dither(pixel: number): number {
  let h = Math.imul(pixel, 0x9E3779B1)
  h = Math.imul(h ^ (h >>> 15), 0x85EBCA6B)
  return ((((h ^ (h >>> 13)) >>> 0) / 4294967296) * 2 - 1) * DITHER
}
