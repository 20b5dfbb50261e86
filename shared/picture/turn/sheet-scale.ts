import type { BlankShape } from '#shared/blank/blank-shape'
import { pictureSize } from '../picture-size'

/** Coarsest and finest sheets, texels to the mm. */
const SCALE = { least: 0.5, most: 24 }
/** Sheets come in sizes this far apart, so that a page that is drawn wider by a little keeps those it has. */
const APART = 1.25

/** Texels to the mm at which a sheet is as fine as the picture it is shown in. */
export function sheetScale(shape: BlankShape, { width, height }: { width: number, height: number }): number {
  const one = pictureSize(shape, 1)
  const pixels = Math.min(width / one.width, height / one.height)
  const even = APART ** Math.round(Math.log(pixels) / Math.log(APART))
  return Math.min(SCALE.most, Math.max(SCALE.least, even))
}
