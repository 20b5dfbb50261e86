import { assertBands, assertWithin, type Spectrum } from './bands'
import { coatLayer } from './coat-layer'
import { layOver } from './film'
import { radianceAtAngles } from './flake-angles'
import { hasGlow } from './glow'
import type { Coat } from './stack'
import { type Finish, measuredSpectrum, SURFACE_INSIDE, SURFACE_OUTSIDE, VEIL } from './surface'

/** Where a coat is looked for: what lies under it, what lies over it, and how the surface ends. */
export interface SceneWish {
  /** Reflectance inside the bare ground, 36 bands, 0…1. */
  ground: Spectrum
  /** Coats that lie there already, from the ground up. */
  below?: readonly Coat[]
  /** Coats that will lie over it: clears. */
  above?: readonly Coat[]
  finish: Finish
  /** Film that one pass lays there, counted in passes of the paint as it was swatched; 1 when left out. */
  laid?: number
}

/** The same, ready for many films to be tried in it. */
export interface FindScene {
  wish: Required<SceneWish>
  /** Reflectance inside all that lies below. */
  ground: Float64Array
  laid: number
  /** What flakes below mirror from the lamp at 45°, less what they would have sent to all sides; dimmed by the coat twice over. */
  shine: Float64Array
  hasShine: boolean
  /** Something below gives off light: a film over it cannot be tried by reflectance alone. */
  hasGlow: boolean
  /** What is seen of N/M inside, through what lies above and the surface: (top·N + topM·M)/(low·N + lowM·M) + veil. */
  through: { top: Float64Array, topM: Float64Array, low: Float64Array, lowM: Float64Array, veil: number }
}

/**
 * Lays out where a coat is looked for.
 *
 * @throws {RangeError} when the ground is not 36 values within 0…1, or flakes or fluorescents lie above
 */
export function findScene(given: SceneWish): FindScene {
  const wish: Required<SceneWish> = { below: [], above: [], laid: 1, ...given }
  const { below, above, laid, finish } = wish
  assertBands('findCoat', 36, wish.ground)
  assertWithin('findCoat', 'the ground', 0, 1, wish.ground)
  assertWithin('findCoat', 'the film of one pass', 0.001, 10, [laid])
  if (above.some(({ optics }) => optics.flake) || hasGlow(above)) throw new RangeError('findCoat: only clears and films may lie over the coat')

  const ground = Float64Array.from(wish.ground)
  const layers = below.map(coat => coatLayer(coat.optics, coat.passes))
  for (const layer of layers) layOver(layer, ground, ground)
  const shine = shineOf(wish, below, layers, ground)
  return { wish, ground, laid, shine, hasShine: shine.some(value => value !== 0), hasGlow: hasGlow(below), through: throughOf(above, finish) }
}

function shineOf({ above, finish }: Required<SceneWish>, below: readonly Coat[], layers: ReturnType<typeof coatLayer>[], ground: Float64Array): Float64Array {
  if (!below.some(({ optics }) => optics.flake)) return new Float64Array(36)
  // A bright flat veil keeps the sum above 0, where it is cut off; it is taken away again.
  const flat = measuredSpectrum(ground, finish).map(value => value + 1)
  const turned = radianceAtAngles(below, layers, flat, [45])[45]
  return turned.map((value, b) => (value - flat[b]!) * above.reduce((kept, { optics, passes }) => kept * Math.exp(-2 * (optics.K[b]! + optics.S[b]!) * passes), 1))
}

function throughOf(above: readonly Coat[], finish: Finish): FindScene['through'] {
  const through = { top: new Float64Array(36), topM: new Float64Array(36), low: new Float64Array(36), lowM: new Float64Array(36), veil: VEIL[finish] }
  const enters = (1 - SURFACE_OUTSIDE) * (1 - SURFACE_INSIDE)
  const layers = above.map(({ optics, passes }) => coatLayer(optics, passes))
  for (let b = 0; b < 36; b++) {
    // N' and M' of what lies above, as sums of N and M below.
    let [nn, nm, mn, mm] = [1, 0, 0, 1]
    for (const { R, T } of layers) {
      const r = R[b]!, t2 = T[b]! ** 2 - r * r
      ;[nn, nm, mn, mm] = [t2 * nn + r * mn, t2 * nm + r * mm, mn - r * nn, mm - r * nm]
    }
    through.top[b] = enters * nn
    through.topM[b] = enters * nm
    through.low[b] = mn - SURFACE_INSIDE * nn
    through.lowM[b] = mm - SURFACE_INSIDE * nm
  }
  return through
}
