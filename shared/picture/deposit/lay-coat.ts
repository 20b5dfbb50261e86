import type { Coat } from '#shared/scheme/coat'
import type { LaidCoat } from '#shared/scheme/laid-coats'
import { layFinShare } from './fin-share'
import { aimOf, caught, type Aim } from './gun-aim'
import type { DepositKeep } from './keep'
import { layMarks } from './mark-map'
import { maskMap } from './mask-map'
import { seedOf, SWING } from './noise'
import { fieldMix, strayDrops, surfaceNoise } from './surface-noise'
import { edgeFade, layZoneShare } from './zone-share'

/** How far a hand strays from an even coat, from a straight edge, and from an even one when it goes all over. */
const HAND = { uneven: 0.07, edge: 0.16, allOver: 0.05, allOverMean: 0.97 }
/** Overspray that settles beyond the coat: its share of a pass, through a stencil, and how much wider than the coat it reaches. */
const MIST = { share: 0.035, throughStencil: 0.01, wider: 3.5, everywhere: 0.25 }
/** Droplets: noise of .05 root of the deposit for one whole pass; two passes are the usual coat and part of it averages out. */
const DROPLETS = 0.05 / Math.SQRT2
/** Chance of a stray drop in its cell, for a whole pass; it follows the deposit, or far mist would pepper what lies around. */
const SPECK_CHANCE = 0.1

/**
 * Lays one effective pass of a coat on every sample of a view: passes (at the best-hit place of the fattest section), into
 * `keep.deposit`. Aim times zones times masks, plus mist, droplets and stray drops; fins by their own shares.
 */
export function layCoat(keep: DepositKeep, { coat, masks }: Pick<LaidCoat, 'coat' | 'masks'>): Float32Array {
  const out = keep.deposit
  out.fill(0)
  if (coat.where.body) {
    layOnBody(keep, coat, masks.some(mask => mask.form.kind !== 'mesh'))
    for (const mask of masks) {
      const map = maskMap(keep, mask)
      for (const i of keep.onBody) out[i] = (out[i] ?? 0) * (map[i] ?? 1)
    }
  }
  if (coat.where.fins.length > 0) layOnFins(keep, coat)
  if (coat.tool.kind === 'airbrush') {
    layDroplets(keep, coat)
    if (coat.marks.length === 0) layStrayDrops(keep, coat)
  }
  return out
}

function layOnBody(keep: DepositKeep, coat: Coat, isThroughStencil: boolean): void {
  const { bodyNormal, section } = keep.samples
  const { deposit, zone, wideZone, onBody } = keep
  const isSprayed = coat.tool.kind === 'airbrush'
  const aim = isSprayed ? aimOf(coat.gun, fattestRadius(keep)) : null
  const isFreehand = coat.marks.length > 0
  const mist = !isSprayed || isFreehand ? 0 : isThroughStencil ? MIST.throughStencil : MIST.share
  const noise = surfaceNoise(keep)
  const [h0, h1, h2] = fieldMix(coat.id, 1)
  const [hand0, hand1, hand2] = noise.hand
  layZoneShare(keep, coat.where, 1, edgeWander(keep, coat, wideZone), zone)
  if (mist > 0) layZoneShare(keep, coat.where, MIST.wider, null, wideZone)
  for (const i of onBody) {
    const hand = SWING * (h0 * (hand0?.[i] ?? 0) + h1 * (hand1?.[i] ?? 0) + h2 * (hand2?.[i] ?? 0))
    const ny = bodyNormal[3 * i + 1] ?? 0
    const nz = bodyNormal[3 * i + 2] ?? 0
    const hit = aim
      ? caught(aim, ny, nz, section[2 * i] ?? 0, section[2 * i + 1] ?? 0) * (1 + HAND.uneven * hand)
      : HAND.allOverMean + HAND.allOver * hand
    let x = hit * (zone[i] ?? 0)
    if (mist > 0) x += mist * wrap(aim, ny, nz) * (MIST.everywhere + (1 - MIST.everywhere) * (wideZone[i] ?? 0))
    deposit[i] = x > 0 ? x : 0
  }
  if (isFreehand) {
    layMarks(keep, coat.marks, seedOf(coat.id, 3), zone)
    for (const i of onBody) deposit[i] = (deposit[i] ?? 0) * (zone[i] ?? 0)
  }
}

/** How far the body turns toward the drifting mist: 1 facing the gun, 0 turned away; a little wraps round. */
function wrap(aim: Aim | null, ny: number, nz: number): number {
  const facing = aim ? ny * aim.up + Math.abs(nz) * aim.out : 0
  return ((1 + facing) / 2) ** 2
}

/** Mean radius of the fattest section, mm: what a spray's width is counted in. */
function fattestRadius(keep: DepositKeep): number {
  return keep.blank.table.halfGirthByU.reduce((a, b) => Math.max(a, b), 0) / Math.PI
}

/** How far a hand moves the edge of this coat at each sample, mm. Uses `room`. */
function edgeWander(keep: DepositKeep, coat: Coat, room: Float32Array): Float32Array {
  const [e0, e1, e2] = fieldMix(coat.id, 2)
  const [edge0, edge1, edge2] = surfaceNoise(keep).edge
  const size = HAND.edge * SWING * edgeFade(coat.where, keep.blank.shape.length)
  for (const i of keep.onBody) room[i] = size * (e0 * (edge0?.[i] ?? 0) + e1 * (edge1?.[i] ?? 0) + e2 * (edge2?.[i] ?? 0))
  return room
}

function layOnFins(keep: DepositKeep, coat: Coat): void {
  const { deposit, onFins } = keep
  layFinShare(keep, coat.where.fins, deposit)
  const [h0, h1, h2] = fieldMix(coat.id, 1)
  const [hand0, hand1, hand2] = surfaceNoise(keep).hand
  for (const i of onFins) {
    const hand = SWING * (h0 * (hand0?.[i] ?? 0) + h1 * (hand1?.[i] ?? 0) + h2 * (hand2?.[i] ?? 0))
    deposit[i] = (deposit[i] ?? 0) * (1 + HAND.uneven * hand)
  }
}

function layDroplets(keep: DepositKeep, coat: Coat): void {
  const { deposit } = keep
  const [d0, d1, d2] = fieldMix(coat.id, 4)
  const [drop0, drop1, drop2] = surfaceNoise(keep).droplets
  for (let i = 0; i < deposit.length; i++) {
    const x = deposit[i] ?? 0
    if (x <= 0) continue
    const n = d0 * (drop0?.[i] ?? 0) + d1 * (drop1?.[i] ?? 0) + d2 * (drop2?.[i] ?? 0)
    deposit[i] = Math.max(0, x + DROPLETS * Math.sqrt(x) * n)
  }
}

function layStrayDrops(keep: DepositKeep, coat: Coat): void {
  const { sample, weight, draw } = strayDrops(keep)
  const { deposit } = keep
  const shift = seedOf(coat.id, 5) / 4294967296
  for (let k = 0; k < sample.length; k++) {
    const i = sample[k] ?? 0
    const x = deposit[i] ?? 0
    if (((draw[k] ?? 0) + shift) % 1 < SPECK_CHANCE * x) deposit[i] = x + (weight[k] ?? 0)
  }
}
