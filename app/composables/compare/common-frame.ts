import type { BlankShape } from '#shared/blank/blank-shape'
import { pictureSize } from '#shared/picture/picture-size'

/** What pictures at one scale show, mm. */
export interface Frame { width: number, height: number }

/** Fine enough for a frame, px for each mm. */
const FINE = 20

/** The frame into which each of the blanks fits with its border, mm. */
export function commonFrame(shapes: readonly BlankShape[]): Frame {
  const sizes = shapes.map(shape => pictureSize(shape, FINE))
  return { width: Math.max(...sizes.map(size => size.width)) / FINE, height: Math.max(...sizes.map(size => size.height)) / FINE }
}

/**
 * Scale at which a frame fills a picture, mm for each pixel.
 * @param pixels width of the picture, > 0
 * @param tall its height as a share of its width
 */
export function frameScale({ width, height }: Frame, pixels: number, tall: number): number {
  return Math.max(width / pixels, height / (pixels * tall))
}
