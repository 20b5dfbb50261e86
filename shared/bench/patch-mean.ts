import type { PatchRgb } from './run-measure'
import { decodeChannel, encodeChannel } from '#shared/optics/screen-colour'

/** A picture's points, four bytes each, row by row. */
export interface Points { data: Uint8ClampedArray, width: number, height: number }

/**
 * Mean colour of a round patch of a photo, sRGB 0 to 255: the mean of the light, not of the codes, so that grain and a sharp
 * edge do not darken it. What lies outside the photo is left out.
 * @param x, y middle of the patch, points from the upper left
 * @throws {RangeError} when no point of the photo lies in the patch
 */
export function patchMean({ data, width, height }: Points, x: number, y: number, radius: number): PatchRgb {
  const sum: [number, number, number] = [0, 0, 0]
  let count = 0
  for (let row = Math.max(0, Math.ceil(y - radius)); row <= Math.min(height - 1, y + radius); row++) {
    for (let column = Math.max(0, Math.ceil(x - radius)); column <= Math.min(width - 1, x + radius); column++) {
      if ((column - x) ** 2 + (row - y) ** 2 > radius ** 2) continue
      const at = 4 * (row * width + column)
      for (const n of [0, 1, 2] as const) sum[n] += decodeChannel((data[at + n] ?? 0) / 255)
      count++
    }
  }
  if (count === 0) throw new RangeError(`patchMean: no point of the photo lies within ${radius} of ${x}, ${y}`)
  const code = (n: 0 | 1 | 2) => 255 * encodeChannel(sum[n] / count)
  return [code(0), code(1), code(2)]
}
