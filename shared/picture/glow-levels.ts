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
  /** Bands it takes photons in, and gives them off in: from the first up to before the last. Elsewhere next to none. */
  taking: BandSpan
  giving: BandSpan
}

/** Picture bands from `from` up to before `to`. */
export interface BandSpan { from: number, to: number }

/** Glow is smooth in thickness: it is worked out at every eighth level and read on straight lines between. */
const STEP = 8
/** What is less than this share of the most is not looked at. */
const LEAST_SHARE = 1e-3
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
  return { takes, back, onward, taking: spanOf(takes), giving: spanOf(back) }
}

/** The bands that matter: where some level reaches a thousandth of the most. */
function spanOf(levels: Float32Array): BandSpan {
  const most = new Float64Array(BANDS)
  levels.forEach((value, i) => most[i % BANDS] = Math.max(most[i % BANDS]!, value))
  const least = LEAST_SHARE * Math.max(...most)
  const from = most.findIndex(value => value > least)
  return from < 0 ? { from: 0, to: 0 } : { from, to: most.findLastIndex(value => value > least) + 1 }
}
