import type { DrawnEye } from '#shared/blank/drawn-parts'
import { layOver, newCanvas, type Canvas } from './canvas'
import { drawEye } from './draw-eye'
import type { EyeColours } from './eye-colours'
import type { LightTables } from './light-tables'

/** Fitted eyes as they lie over a picture: the pixels they touch, and for each its share and its light. */
export interface EyeLayer { pixels: Uint32Array, share: Float32Array, light: Float32Array }

/** Draws fitted eyes once for all pictures of a view in one light. */
export function eyeLayer({ width, height, body }: Canvas, eyes: readonly DrawnEye[], colours: EyeColours, tables: LightTables, plain: boolean): EyeLayer {
  const canvas = { ...newCanvas(width, height), body }
  for (const eye of eyes) drawEye(canvas, eye, colours, tables, plain)
  const pixels = Uint32Array.from(canvas.cover.keys()).filter(pixel => canvas.cover[pixel]! > 0)
  const light = new Float32Array(3 * pixels.length)
  pixels.forEach((pixel, i) => light.set(canvas.light.subarray(3 * pixel, 3 * pixel + 3), 3 * i))
  return { pixels, share: Float32Array.from(pixels, pixel => canvas.cover[pixel]!), light }
}

/** Lays eyes over a picture. */
export function layEyes(canvas: Canvas, { pixels, share, light }: EyeLayer): void {
  for (let i = 0; i < pixels.length; i++) layOver(canvas, pixels[i]!, share[i]!, light[3 * i]!, light[3 * i + 1]!, light[3 * i + 2]!)
}
