import type { Mark } from '#shared/scheme/mark'
import type { DepositKeep } from './keep'
import { fbm, gradientNoise, hash2, noise2, type Slope } from './noise'
import { normalShare, smoothStep } from './normal-share'

type Worms = Extract<Mark, { kind: 'worm tracks' }>
type Sponge = Extract<Mark, { kind: 'torn sponge' }>

/** Tracks run longer along the body, wander, and break off. */
const WORM = { stretch: 1.25, wander: 0.35, wanderSize: 2.2, soft: 0.06, breakFrom: -1.0, breakTo: -0.45, breakSize: 3.5, leastSlope: 0.35 }
/** Standard deviation of a sponge's relief: thresholds between -1 and 1 are heights of it. */
const RELIEF = 0.18
const SPONGE = { stretch: 1.3, octaves: 4, tear: 0.22, tearSize: 0.33 }

/** Height over the belly's ridge is not used: patterns run over the back unbroken and meet unmatched under the belly. */
function roundTheBack(keep: DepositKeep, i: number): number {
  return (keep.samples.side[i] ?? 1) > 0 ? keep.toBack[i] ?? 0 : -(keep.toBack[i] ?? 0)
}

/** Worm tracks: the zero line of a wandering noise, a band of even width along it. 0 to 1 at every sample of the body. */
export function wormMap(keep: DepositKeep, mark: Worms): Float32Array {
  const scale = keep.blank.shape.length / 100
  const size = mark.wavelength * scale
  const half = mark.width * scale / 2
  const out = new Float32Array(keep.samples.count)
  const slope: Slope = { value: 0, dx: 0, dy: 0 }
  const seed = hash2(mark.seed, 1, 0x7f4a7c15)
  for (const i of keep.onBody) {
    const x = (keep.samples.U[i] ?? 0) / (size * WORM.stretch)
    const y = roundTheBack(keep, i) / size
    gradientNoise(
      x + WORM.wander * noise2(x / WORM.wanderSize, y / WORM.wanderSize, seed + 1),
      y + WORM.wander * noise2(x / WORM.wanderSize, y / WORM.wanderSize, seed + 2), seed, slope,
    )
    const steep = Math.hypot(slope.dx / WORM.stretch, slope.dy)
    const d = Math.abs(slope.value) / Math.max(WORM.leastSlope, steep) * size
    if (d > half + 4 * WORM.soft) continue
    const unbroken = smoothStep(WORM.breakFrom, WORM.breakTo, noise2(x / WORM.breakSize, y / WORM.breakSize, seed + 3))
    if (unbroken > 0) out[i] = unbroken * normalShare((half * (0.7 + 0.3 * unbroken) - d) / WORM.soft)
  }
  return out
}

/** A torn sponge dabbed on: patches where its relief stands above the threshold. 0 to 1 at every sample of the body. */
export function spongeMap(keep: DepositKeep, mark: Sponge): Float32Array {
  const out = new Float32Array(keep.samples.count)
  const seed = hash2(mark.seed, 2, 0x7f4a7c15)
  const threshold = mark.threshold / RELIEF
  const soft = mark.soft / RELIEF
  for (const i of keep.onBody) {
    const x = (keep.samples.U[i] ?? 0) / (mark.size * SPONGE.stretch)
    const y = roundTheBack(keep, i) / mark.size
    // Torn rather than rounded: small folds pull the patches' edges about.
    const tearX = SPONGE.tear * noise2(x / SPONGE.tearSize, y / SPONGE.tearSize, seed + 5)
    const tearY = SPONGE.tear * noise2(x / SPONGE.tearSize, y / SPONGE.tearSize, seed + 6)
    out[i] = normalShare((fbm(x + tearX, y + tearY, SPONGE.octaves, seed) - threshold) / soft)
  }
  return out
}
