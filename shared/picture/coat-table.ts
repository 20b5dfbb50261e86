import { coefficientsIn } from '#shared/optics/coat-layer'
import { filmInto } from '#shared/optics/film'
import { glowOf } from '#shared/optics/fluorescence'
import type { Flake, SingleFlake } from '#shared/optics/flake'
import { flakeCoat } from '#shared/optics/flake-coat'
import { FLAKE_TABLE_COSINES } from '#shared/optics/flake-table'
import { meanFlake, meanFlakeInDiffuse } from '#shared/optics/mean-flake'
import type { PaintOptics } from '#shared/optics/paint-optics'
import { AIR_SURFACE, type SurfaceLoss } from '#shared/optics/surface'
import { glowLevels, type GlowLevels } from './glow-levels'
import { BANDS, fillBetween, LEVELS } from './level-table'

export { BANDS, LEVELS } from './level-table'

/** A coat of flakes is smooth in its thickness: it is worked out at every fourth level and read on straight lines between. */
const FLAKE_STEP = 4
/** Change of reflectance too small to see on any ground. */
const UNSEEN = 4e-4

/** The flake part of a coat's table. */
export interface FlakeLevels {
  sigma: number
  /** Six rows of 16 for each level, one per cosine of `FLAKE_TABLE_COSINES`: what flakes mirror, without what their edges scatter. */
  mirrored: Float32Array
  /** 16 for each level: what the same flakes sent to all sides. */
  diffuse: Float32Array
  /** How much the flakes glint. */
  sparkle: number
}

/** One coat of one paint, 16 bands for each of the 256 levels of its deposit. */
export interface CoatTable {
  /** Reflectance. */
  R: Float32Array
  /** Transmittance. */
  T: Float32Array
  /** T² - R². */
  Q: Float32Array
  /** What a ray keeps that goes down and up again through the coat. */
  through: Float32Array
  /** Levels up to this one change nothing one could see. */
  empty: number
  flake?: FlakeLevels
  glow?: GlowLevels
}

/**
 * Tabulates a coat for pictures.
 *
 * @param passes passes where the deposit is thickest: level j stands for passes·(j/255)²
 */
export function coatTable(paint: PaintOptics, passes: number, surface: Pick<SurfaceLoss, 'outside' | 'inside'> = AIR_SURFACE): CoatTable {
  const { K, S } = coefficientsIn(paint, 'picture16')
  const table: CoatTable = {
    R: new Float32Array(LEVELS * BANDS), T: new Float32Array(LEVELS * BANDS), Q: new Float32Array(LEVELS * BANDS), through: new Float32Array(LEVELS * BANDS), empty: 0,
  }
  if (paint.flake) fillFlakes(table, paint.flake, K, S, passes, (1 - surface.outside) * (1 - surface.inside))
  else fillFilm(table, K, S, passes)
  table.empty = emptyLevel(table)
  const glow = glowOf(paint)
  if (glow) table.glow = glowLevels(paint, glow, level => passesAt(level, passes), table)
  return table
}

function passesAt(level: number, passes: number): number {
  return passes * (level / (LEVELS - 1)) ** 2
}

function fillFilm({ R, T, Q, through }: CoatTable, K: Float64Array, S: Float64Array, passes: number): void {
  const pair = new Float64Array(2)
  for (let level = 0; level < LEVELS; level++) {
    const X = passesAt(level, passes)
    for (let b = 0; b < BANDS; b++) {
      filmInto(K[b]!, S[b]!, X, pair)
      const at = level * BANDS + b
      R[at] = pair[0]!
      T[at] = pair[1]!
      Q[at] = pair[1]! * pair[1]! - pair[0]! * pair[0]!
      through[at] = Math.exp(-2 * (K[b]! + S[b]!) * X)
    }
  }
}

function fillFlakes(table: CoatTable, flake: Flake, K: Float64Array, S: Float64Array, passes: number, crossing: number): void {
  const { R, T, Q, through } = table
  const rows = FLAKE_TABLE_COSINES.length
  const mirrored = new Float32Array(LEVELS * rows * BANDS), diffuse = new Float32Array(LEVELS * BANDS)
  const all = meanFlake(flake, FLAKE_TABLE_COSINES, 'picture16')
  const angled = FLAKE_TABLE_COSINES.map((_, c): SingleFlake => ({
    R: all.R.subarray(c * BANDS, (c + 1) * BANDS), T: all.T.subarray(c * BANDS, (c + 1) * BANDS),
  }))
  const even = meanFlakeInDiffuse(flake, 'picture16')

  for (let step = 0; step * FLAKE_STEP < LEVELS; step++) {
    const level = Math.min(LEVELS - 1, step * FLAKE_STEP)
    fillFlakeLevel(level)
  }
  fillFlakeLevel(LEVELS - 1)
  for (const [array, width] of [[R, BANDS], [T, BANDS], [Q, BANDS], [through, BANDS], [diffuse, BANDS], [mirrored, rows * BANDS]] as const) {
    fillBetween(array, width, FLAKE_STEP)
  }
  table.flake = { sigma: flake.sigma, mirrored, diffuse, sparkle: sparkleOf(flake) }

  function fillFlakeLevel(level: number): void {
    const X = passesAt(level, passes)
    const coat = flakeCoat(even, flake.flakesPerPass, K, S, X)
    for (let b = 0; b < BANDS; b++) {
      const at = level * BANDS + b
      const r = coat.R[b]!, t = coat.T[b]!
      R[at] = r
      T[at] = t
      Q[at] = t * t - r * r
      through[at] = t * t
      diffuse[at] = (1 - flake.edge) * crossing * r
    }
    angled.forEach((one, row) => {
      const lit = flakeCoat(one, flake.flakesPerPass, K, S, X)
      for (let b = 0; b < BANDS; b++) mirrored[(level * rows + row) * BANDS + b] = (1 - flake.edge) * lit.R[b]!
    })
  }
}

/** Aluminium glints most, fine pearls (whose tilts spread wide) least. Chosen by eye. */
function sparkleOf({ oxide, sigma }: Flake): number {
  if (oxide === 'aluminium') return 0.14
  return sigma > 10 ? 0.04 : 0.08
}

function emptyLevel({ R, through }: CoatTable): number {
  let level = 0
  while (level + 1 < LEVELS && isUnseen(level + 1)) level++
  return level

  function isUnseen(at: number): boolean {
    for (let i = at * BANDS; i < (at + 1) * BANDS; i++) if (R[i]! > UNSEEN || 1 - through[i]! > 2 * UNSEEN) return false
    return true
  }
}
