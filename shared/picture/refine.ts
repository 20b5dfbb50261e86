import type { ViewSamples } from '#shared/blank/view-sample-lists'
import type { Canvas } from './canvas'
import { screenCode } from './screen-code'

/** Places of four samples in a pixel: every row and column of quarters holds one. */
export const FOUR_PLACES = Float32Array.of(0.375, 0.125, 0.875, 0.375, 0.125, 0.625, 0.625, 0.875)
/** Places of nine samples in a pixel, for pictures so small that a highlight would break into dots. */
export const NINE_PLACES = Float32Array.from([1, 3, 5].flatMap(row => [1, 3, 5].flatMap(column => [column / 6, row / 6])))

/**
 * Pixels where the finished picture jumps: a neighbour right or below differs by more than `limit` in a screen value of 0-1.
 *
 * Looking at the picture and not at the coats also catches highlights, eyes and outlines.
 */
export function jumpingPixels({ width, height, light, cover }: Canvas, limit: number): Uint32Array<ArrayBuffer> {
  const codes = new Float32Array(light.length)
  for (let i = 0; i < codes.length; i++) if (light[i] !== 0) codes[i] = screenCode(light[i]!) / 255
  const jumps = new Uint8Array(width * height)
  for (let row = 0; row < height; row++) {
    for (let column = 0; column < width; column++) {
      const pixel = row * width + column
      if (column + 1 < width) compare(pixel, pixel + 1)
      if (row + 1 < height) compare(pixel, pixel + width)
    }
  }
  const found: number[] = []
  for (let pixel = 0; pixel < jumps.length; pixel++) if (jumps[pixel] && cover[pixel]! > 0) found.push(pixel)
  return Uint32Array.from(found)

  function compare(a: number, b: number): void {
    if (cover[a] === 0 && cover[b] === 0) return
    for (let c = 0; c < 3; c++) {
      if (Math.abs(codes[3 * a + c]! - codes[3 * b + c]!) > limit) jumps[a] = jumps[b] = 1
    }
  }
}

/** Every pixel that shows anything. */
export function shownPixels({ cover }: Canvas): Uint32Array<ArrayBuffer> {
  const found: number[] = []
  for (let pixel = 0; pixel < cover.length; pixel++) if (cover[pixel]! > 0) found.push(pixel)
  return Uint32Array.from(found)
}

/**
 * Puts the mean of several samples into their pixels. A pixel keeps the coverage it had, which is finer than a count of samples.
 *
 * @param light three per sample, `each` samples for each pixel one after the other
 */
export function putRefined(canvas: Canvas, pixels: Uint32Array, samples: ViewSamples, light: Float32Array, each: number): void {
  for (let i = 0; i < pixels.length; i++) {
    const pixel = pixels[i]!
    let hits = 0, red = 0, green = 0, blue = 0
    for (let k = i * each; k < (i + 1) * each; k++) {
      const share = samples.coverage[k]!
      if (share === 0) continue
      hits += share
      red += share * light[3 * k]!
      green += share * light[3 * k + 1]!
      blue += share * light[3 * k + 2]!
    }
    if (hits === 0) continue
    const scale = canvas.cover[pixel]! / hits
    canvas.light[3 * pixel] = scale * red
    canvas.light[3 * pixel + 1] = scale * green
    canvas.light[3 * pixel + 2] = scale * blue
  }
}
