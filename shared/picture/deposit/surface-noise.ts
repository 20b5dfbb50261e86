import type { DepositKeep, Specks, SurfaceNoise } from './keep'
import { hash2, hashShare, noise2, noise3, seedOf } from './noise'

/** Independent fields of each kind of noise. A coat mixes them by a direction of its own, so its noise keeps unit variance. */
const FIELDS = 3
/** Sizes of a hand's unevenness and of an edge's wander, shares of the length: along the body and round it. */
const HAND = { along: 0.13, round: 0.10, fineAlong: 0.045, fineRound: 0.05 }
const EDGE = { along: 0.16, round: 0.20 }
/** Droplets of two sizes, mm, and the share of the larger. */
const DROPLET = { small: 0.10, large: 0.27, share: 0.55 }
/** Cells that may hold one stray drop, mm, and the radius of a drop. */
const SPECK = { cell: 0.55, radiusFrom: 0.04, radiusTo: 0.11, amountFrom: 0.25, amountTo: 0.375 }

/** The noise of a view, made at the first call and kept. */
export function surfaceNoise(keep: DepositKeep): SurfaceNoise {
  keep.noise ??= makeNoise(keep)
  return keep.noise
}

/** How a coat mixes the fields of one kind: a unit vector that belongs to its id. */
export function fieldMix(name: string, use: number): [number, number, number] {
  const mix = [0, 1, 2].map((k) => {
    const radius = Math.sqrt(-2 * Math.log(1 - hashShare(k, 0, seedOf(name, use))))
    return radius * Math.cos(2 * Math.PI * hashShare(k, 1, seedOf(name, use)))
  })
  const size = Math.hypot(...mix) || 1
  return [(mix[0] ?? 0) / size, (mix[1] ?? 0) / size, (mix[2] ?? 0) / size]
}

function makeNoise(keep: DepositKeep): SurfaceNoise {
  const { samples: { count, U, V, section, part, side, view }, blank } = keep
  const L = blank.shape.length
  const fields = () => Array.from({ length: FIELDS }, () => new Float32Array(count))
  const noise: SurfaceNoise = { hand: fields(), edge: fields(), droplets: fields() }
  // Small pixels show every droplet, large ones their mean.
  const seen = Math.min(1, 0.11 * view.scale) / Math.hypot(1, DROPLET.share)
  const handUnit = 1 / Math.hypot(1, 0.5)
  const layBodyNoise = (i: number) => {
    // In space rather than on the skin: no seam along the back or belly, and two sides that differ.
    const x = (U[i] ?? 0) / L
    const y = (section[2 * i] ?? 0) / L
    const z = 1.3 * (section[2 * i + 1] ?? 0) / L
    for (let f = 0; f < FIELDS; f++) layHand(i, f, x, y, z)
  }
  const layHand = (i: number, f: number, x: number, y: number, z: number) => {
    const hand = noise.hand[f]
    const edge = noise.edge[f]
    if (!hand || !edge) return
    hand[i] = handUnit * (
      noise3(x / HAND.along, y / HAND.round, z / HAND.round, 101 + f)
      + 0.5 * noise3(x / HAND.fineAlong, y / HAND.fineRound, z / HAND.fineRound, 211 + f)
    )
    edge[i] = noise3(x / EDGE.along, y / EDGE.round, z / EDGE.round, 307 + f)
  }
  const layDroplets = (i: number) => {
    const seed = hash2(part[i] ?? 0, side[i] ?? 1, 401)
    for (let f = 0; f < FIELDS; f++) {
      const droplets = noise.droplets[f]
      if (!droplets) continue
      droplets[i] = seen * (
        noise2((U[i] ?? 0) / DROPLET.small, (V[i] ?? 0) / DROPLET.small, seed + f)
        + DROPLET.share * noise2((U[i] ?? 0) / DROPLET.large, (V[i] ?? 0) / DROPLET.large, seed + 17 + f)
      )
    }
  }
  for (const i of keep.onBody) {
    layBodyNoise(i)
    layDroplets(i)
  }
  for (const i of keep.onFins) {
    for (let f = 0; f < FIELDS; f++) layHand(i, f, (U[i] ?? 0) / L, (V[i] ?? 0) / L, part[i] ?? 0)
    layDroplets(i)
  }
  return noise
}

/** The stray drops of a view, found at the first call and kept. */
export function strayDrops(keep: DepositKeep): Specks {
  keep.specks ??= findSpecks(keep)
  return keep.specks
}

function findSpecks(keep: DepositKeep): Specks {
  const { U, V, side } = keep.samples
  const [sample, weight, draw]: [number[], number[], number[]] = [[], [], []]
  for (const i of keep.onBody) {
    const x = (U[i] ?? 0) / SPECK.cell
    const y = (V[i] ?? 0) / SPECK.cell
    const cx = Math.floor(x)
    const cy = Math.floor(y)
    const seed = (side[i] ?? 1) > 0 ? 503 : 509
    const own = hashShare(cx, cy, seed)
    const radius = SPECK.radiusFrom + (SPECK.radiusTo - SPECK.radiusFrom) * own
    // A drop smaller than a pixel is spread over it, paint kept.
    const shown = Math.min(0.4 * SPECK.cell, Math.max(radius, 0.45 * keep.pixel))
    const room = 1 - 2 * shown / SPECK.cell
    const dx = (x - cx - shown / SPECK.cell - room * hashShare(cx, cy, seed + 1)) * SPECK.cell
    const dy = (y - cy - shown / SPECK.cell - room * hashShare(cx, cy, seed + 2)) * SPECK.cell
    const q = (dx * dx + dy * dy) / (shown * shown)
    if (q >= 1) continue
    sample.push(i)
    weight.push((SPECK.amountFrom + (SPECK.amountTo - SPECK.amountFrom) * own) * (1 - q * q) * (radius / shown) ** 2)
    draw.push(hashShare(cx, cy, seed + 3))
  }
  return { sample: Uint32Array.from(sample), weight: Float32Array.from(weight), draw: Float32Array.from(draw) }
}
