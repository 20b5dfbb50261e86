import { coatLayer, flakeCoatAt } from './coat-layer'
import type { PaintOptics } from './paint-optics'

/** Cosines between light and flake, in the binder, that a picture's table has rows for. */
export const FLAKE_TABLE_COSINES: readonly number[] = [1, 0.94, 0.88, 0.82, 0.76, 0.7]

/** Everything a picture needs of one coat of flakes, in the 16 bands of pictures. */
export interface FlakeTable {
  passes: number
  /** R of the coat, six rows of 16, one per cosine of `FLAKE_TABLE_COSINES`. */
  mirrored: Float64Array
  /** R and T of the coat in diffuse light, 16 each. */
  R: Float64Array
  T: Float64Array
  /** Spread of the flakes' tilt, degrees, and share scattered by edges. */
  sigma: number
  edge: number
}

/**
 * Tabulates a coat of flakes for pictures. Between rows read on straight lines.
 *
 * @throws {RangeError} when the paint has no flakes
 */
export function flakeTable(paint: PaintOptics, passes: number): FlakeTable {
  if (!paint.flake) throw new RangeError('flakeTable: the paint has no flakes')
  const rows = flakeCoatAt(paint, passes, FLAKE_TABLE_COSINES, 'picture16')
  const mirrored = new Float64Array(16 * rows.length)
  rows.forEach((row, i) => mirrored.set(row.R, 16 * i))
  const { R, T } = coatLayer(paint, passes, 'picture16')
  return { passes, mirrored, R, T, sigma: paint.flake.sigma, edge: paint.flake.edge }
}
