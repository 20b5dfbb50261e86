import type { DepositKeep, Specks, SurfaceNoise } from './keep'
import { addThreeNoises, addThreeSpaceNoises, hash2, hashShare, seedOf } from './noise'

/** Independent fields of each kind of noise. A coat mixes them by a direction of its own, so its noise keeps unit variance. */
const FIELDS = 3
/** Sizes of a hand's unevenness and of an edge's wander, shares of the length: along the body and round it. */
const HAND = { along: 0.13, round: 0.10, fineAlong: 0.045, fineRound: 0.05 }
/** Bodies are thinner than high: their depth counts more, so that the flanks are unlike. */
const DEPTH = 1.3
const EDGE = { along: 0.16, round: 0.20 }
/** A hand's noise is worked out at every fourth sample of a column, where pixels are at least so fine (pixels a mm) and face the viewer. */
const STRIDE = 4
const STRIDE_SCALE = 4
const STRIDE_FACING = 0.35
/** Droplets of two sizes, mm, and the share of the larger. */
const DROPLET = { small: 0.10, large: 0.27, share: 0.55 }
/** Cells that may hold one stray drop, mm, and the radius of a drop. */
const SPECK = { cell: 0.55, radiusFrom: 0.04, radiusTo: 0.11, amountFrom: 0.25, amountTo: 0.375 }

/** What a coat mixes of the three values that lie side by side for sample i. */
export function mixed(fields: Float32Array, i: number, mix: readonly [number, number, number]): number {
  const at = FIELDS * i
  return mix[0] * (fields[at] ?? 0) + mix[1] * (fields[at + 1] ?? 0) + mix[2] * (fields[at + 2] ?? 0)
}

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
  const noise: SurfaceNoise = {
    hand: new Float32Array(FIELDS * count), edge: new Float32Array(FIELDS * count), droplets: new Float32Array(FIELDS * count),
  }
  // Small pixels show every droplet, large ones their mean.
  const seen = Math.min(1, 0.11 * view.scale) / Math.hypot(1, DROPLET.share)
  const handUnit = 1 / Math.hypot(1, 0.5)
  const three = new Float64Array(FIELDS)
  const write = (fields: Float32Array, i: number) => {
    for (let f = 0; f < FIELDS; f++) fields[FIELDS * i + f] = three[f] ?? 0
    three.fill(0)
  }
  const layHand = (i: number, x: number, y: number, z: number) => {
    addThreeSpaceNoises(x / HAND.along, y / HAND.round, z / HAND.round, 101, handUnit, three)
    addThreeSpaceNoises(x / HAND.fineAlong, y / HAND.fineRound, z / HAND.fineRound, 211, 0.5 * handUnit, three)
    write(noise.hand, i)
    addThreeSpaceNoises(x / EDGE.along, y / EDGE.round, z / EDGE.round, 307, 1, three)
    write(noise.edge, i)
  }
  const layDroplets = (i: number) => {
    const seed = hash2(part[i] ?? 0, side[i] ?? 1, 401)
    addThreeNoises((U[i] ?? 0) / DROPLET.small, (V[i] ?? 0) / DROPLET.small, seed, seen, three)
    addThreeNoises((U[i] ?? 0) / DROPLET.large, (V[i] ?? 0) / DROPLET.large, seed + 17, DROPLET.share * seen, three)
    write(noise.droplets, i)
  }
  // In space rather than on the skin: no seam along back or belly, and two sides that differ.
  const layOnBody = (i: number) => layHand(i, (U[i] ?? 0) / L, (section[2 * i] ?? 0) / L, DEPTH * (section[2 * i + 1] ?? 0) / L)
  for (let k = 0; k < keep.onBody.length;) {
    const i = keep.onBody[k] ?? 0
    layOnBody(i)
    // What a hand does is far wider than a few pixels of a column: between two of them it runs straight.
    if (!runsOn(keep, k)) {
      k++
      continue
    }
    layOnBody(i + STRIDE)
    for (const fields of [noise.hand, noise.edge]) between(fields, i)
    k += STRIDE
  }
  for (const i of keep.onFins) layHand(i, (U[i] ?? 0) / L, (V[i] ?? 0) / L, part[i] ?? 0)
  for (const list of [keep.onBody, keep.onFins]) for (const i of list) layDroplets(i)
  return noise
}

/** True when the next few samples of the body lie one under the other in one column, well apart from the outline. */
function runsOn({ onBody, samples: { pixel, normal, view } }: DepositKeep, k: number): boolean {
  const i = onBody[k] ?? 0
  return onBody[k + STRIDE] === i + STRIDE
    && Math.abs((pixel[i + STRIDE] ?? 0) - (pixel[i] ?? 0)) === STRIDE * view.width
    && view.scale >= STRIDE_SCALE
    && Math.min(normal[3 * i + 2] ?? 0, normal[3 * (i + STRIDE) + 2] ?? 0) > STRIDE_FACING
}

function between(fields: Float32Array, i: number): void {
  for (let f = 0; f < FIELDS; f++) {
    const from = fields[FIELDS * i + f] ?? 0
    const step = ((fields[FIELDS * (i + STRIDE) + f] ?? 0) - from) / STRIDE
    for (let n = 1; n < STRIDE; n++) fields[FIELDS * (i + n) + f] = from + n * step
  }
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
