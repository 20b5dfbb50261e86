import type { Mark } from '#shared/scheme/mark'
import type { DepositKeep } from './keep'
import { fbm, gradientNoise, hash2, newSlope, noise2, SWING } from './noise'
import { normalShare, smoothStep } from './normal-share'

type Worms = Extract<Mark, { kind: 'worm tracks' }>
type Sponge = Extract<Mark, { kind: 'torn sponge' }>

/** Tracks run longer along the body, wander, and break off. Sizes in wavelengths. */
const WORM = { stretch: 1.25, finer: 1.25, wander: 0.3, wanderSize: 1.5, soft: 0.06, breakFrom: -1.0, breakTo: -0.45, breakSize: 3.5, leastSlope: 0.35, swells: 0.3, swellSize: 0.7 }
/** Standard deviation of a sponge's relief: thresholds between -1 and 1 are heights of it. */
const RELIEF = 0.18
const SPONGE = { coarser: 1.35, stretch: 1.3, slant: 0.35, octaves: 4, tear: 0.12, tearSize: 0.4 }

/** mm from the ridge of the back, + on the left: patterns run over the back unbroken and meet unmatched under the belly. */
function roundTheBack(keep: DepositKeep, i: number): number {
  return (keep.samples.side[i] ?? 1) > 0 ? keep.toBack[i] ?? 0 : -(keep.toBack[i] ?? 0)
}

/** Worm tracks: the zero line of a wandering noise, a band of even width along it. 0 to 1 at every sample of the body. */
export function wormMap(keep: DepositKeep, mark: Worms): Float32Array {
  const scale = keep.blank.shape.length / 100
  const size = mark.wavelength * scale / WORM.finer
  const half = mark.width * scale / 2
  const out = new Float32Array(keep.samples.count)
  const [slope, pullX, pullY] = [newSlope(), newSlope(), newSlope()]
  const seed = hash2(mark.seed, 1, 0x7f4a7c15)
  const turn = WORM.wander / WORM.wanderSize
  for (const i of keep.onBody) {
    const x = (keep.samples.U[i] ?? 0) / (size * WORM.stretch)
    const y = roundTheBack(keep, i) / size
    gradientNoise(x / WORM.wanderSize, y / WORM.wanderSize, seed + 1, pullX)
    gradientNoise(x / WORM.wanderSize, y / WORM.wanderSize, seed + 2, pullY)
    gradientNoise(x + WORM.wander * pullX.value, y + WORM.wander * pullY.value, seed, slope)
    // The slope on the body, wander and stretch included: a track keeps its width where the noise runs flat.
    const dx = (slope.dx * (1 + turn * pullX.dx) + slope.dy * turn * pullY.dx) / WORM.stretch
    const dy = slope.dx * turn * pullX.dy + slope.dy * (1 + turn * pullY.dy)
    const steep = Math.sqrt(dx * dx + dy * dy)
    const d = Math.abs(slope.value) / Math.max(WORM.leastSlope, steep) * size
    const soft = Math.hypot(WORM.soft, keep.blur[i] ?? 0)
    if (d > half * 1.5 + 4 * soft) continue
    const unbroken = smoothStep(WORM.breakFrom, WORM.breakTo, noise2(x / WORM.breakSize, y / WORM.breakSize, seed + 3))
    if (unbroken <= 0) continue
    // A tip of a brush swells and thins, and runs out to nothing before it breaks off.
    const swell = 1 + WORM.swells * SWING * noise2(x / WORM.swellSize, y / WORM.swellSize, seed + 4)
    out[i] = Math.sqrt(unbroken) * normalShare((half * swell * unbroken - d) / soft)
  }
  return out
}

/** A torn sponge dabbed on: patches where its relief stands above the threshold. 0 to 1 at every sample of the body. */
export function spongeMap(keep: DepositKeep, mark: Sponge): Float32Array {
  const out = new Float32Array(keep.samples.count)
  const seed = hash2(mark.seed, 2, 0x7f4a7c15)
  const size = SPONGE.coarser * mark.size
  const work = newSlope()
  const threshold = mark.threshold / RELIEF
  const soft = mark.soft / RELIEF
  for (const i of keep.onBody) {
    const y = roundTheBack(keep, i) / size
    const x = (keep.samples.U[i] ?? 0) / (size * SPONGE.stretch) + SPONGE.slant * y
    // Torn rather than rounded: small folds pull the patches' edges about.
    const tearX = SPONGE.tear * noise2(x / SPONGE.tearSize, y / SPONGE.tearSize, seed + 5)
    const tearY = SPONGE.tear * noise2(x / SPONGE.tearSize, y / SPONGE.tearSize, seed + 6)
    out[i] = normalShare((fbm(x + tearX, y + tearY, SPONGE.octaves, seed, work) - threshold) / soft)
  }
  return out
}
