import type { Glow } from '#shared/optics/fluorescence'
import { glowingCoat, glowShare } from '#shared/optics/glow'
import { solveGlow } from '#shared/optics/glow-chain'
import { fallingLight } from '#shared/optics/light-power'
import type { PaintOptics } from '#shared/optics/paint-optics'
import { PICTURE_BAND_WIDTHS, toPictureBands } from '#shared/optics/to-picture-bands'
import { BANDS, fillBetween, LEVELS } from './level-table'

/** The glow part of a coat's table, 16 for each level. Photons count per 10 nm. */
export interface GlowLevels {
  /** Photons the coat takes for its glow, of one that falls on it from either side in each band; times the width of the band. */
  takes: Float32Array
  /** Photons given off on the side the light came from, and on the other, for one photon taken in all. */
  back: Float32Array
  onward: Float32Array
}

/** Glow is smooth in thickness: it is worked out at every eighth level and read on straight lines between. */
const STEP = 8
const BLACK = new Float64Array(36)

/**
 * Tabulates what a coat gives off, by itself: lit from one side, with nothing over or under it. By symmetry that is also what it
 * does when lit from the other.
 *
 * @param passesAt passes of a level
 */
export function glowLevels(paint: PaintOptics, glow: Glow, passesAt: (level: number) => number, { R, T }: { R: Float32Array, T: Float32Array }): GlowLevels {
  const takes = new Float32Array(LEVELS * BANDS), back = new Float32Array(LEVELS * BANDS), onward = new Float32Array(LEVELS * BANDS)
  const share = glowShare(paint, glow, 'picture16')
  for (let i = 0; i < takes.length; i++) {
    const b = i % BANDS
    takes[i] = share[b]! * PICTURE_BAND_WIDTHS[b]! * Math.max(0, 1 - R[i]! - T[i]!)
  }
  const { photons } = fallingLight('D65')
  for (let level = 0; level < LEVELS; level = level === LEVELS - 1 ? LEVELS : Math.min(LEVELS - 1, level + STEP)) {
    // No paint takes no light: the shape of its glow is that of very little paint.
    const cut = glowingCoat(paint, glow, passesAt(Math.max(1, level)))
    const { out, sunk, fed } = solveGlow({ ...cut, ground: BLACK, inside: 0 }, photons)
    if (!(fed > 0)) continue
    back.set(toPictureBands(out.map(value => value / fed)), level * BANDS)
    onward.set(toPictureBands(sunk.map(value => value / fed)), level * BANDS)
  }
  for (const array of [back, onward]) fillBetween(array, BANDS, STEP)
  return { takes, back, onward }
}
