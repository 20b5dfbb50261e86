import type { Coat } from '#shared/scheme/coat'
import type { LaidCoat } from '#shared/scheme/laid-coats'
import { layFinShare } from './fin-share'
import { aimOf, caught, type Aim } from './gun-aim'
import type { DepositKeep } from './keep'
import { layMarks } from './mark-map'
import { maskMap } from './mask-map'
import { seedOf, SWING } from './noise'
import { fieldMix, mixed, strayDrops, surfaceNoise } from './surface-noise'
import { edgeFade, hasEdge, layZoneShare } from './zone-share'

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
    for (const mask of masks) multiply(out, maskMap(keep, mask), keep.onBody)
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
  const { hand } = surfaceNoise(keep)
  const mix = fieldMix(coat.id, 1)
  layZoneShare(keep, coat.where, 1, edgeWander(keep, coat, wideZone), zone)
  if (mist > 0) layZoneShare(keep, coat.where, MIST.wider, null, wideZone)
  for (let k = 0; k < onBody.length; k++) {
    const i = onBody[k] ?? 0
    const inZone = zone[i] ?? 0
    const drift = mist > 0 ? mist * (MIST.everywhere + (1 - MIST.everywhere) * (wideZone[i] ?? 0)) : 0
    if (inZone <= 0 && drift <= 0) continue
    const ny = bodyNormal[3 * i + 1] ?? 0
    const nz = bodyNormal[3 * i + 2] ?? 0
    let x = 0
    if (inZone > 0) {
      const uneven = SWING * mixed(hand, i, mix)
      x = inZone * (aim
        ? caught(aim, ny, nz, section[2 * i] ?? 0, section[2 * i + 1] ?? 0) * (1 + HAND.uneven * uneven)
        : HAND.allOverMean + HAND.allOver * uneven)
    }
    if (drift > 0) x += drift * wrap(aim, ny, nz)
    deposit[i] = x
  }
  if (isFreehand) {
    layMarks(keep, coat.marks, seedOf(coat.id, 3), zone)
    multiply(deposit, zone, onBody)
  }
}

function multiply(into: Float32Array, by: Float32Array, where: Uint32Array): void {
  for (let k = 0; k < where.length; k++) {
    const i = where[k] ?? 0
    into[i] = (into[i] ?? 0) * (by[i] ?? 0)
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

/** How far a hand moves the edge of this coat at each sample, mm, in `room`; null when the coat has no edge. */
function edgeWander(keep: DepositKeep, coat: Coat, room: Float32Array): Float32Array | null {
  if (!hasEdge(coat.where.zones)) return null
  const mix = fieldMix(coat.id, 2)
  const { edge } = surfaceNoise(keep)
  const size = HAND.edge * SWING * edgeFade(coat.where, keep.blank.shape.length)
  for (let k = 0; k < keep.onBody.length; k++) {
    const i = keep.onBody[k] ?? 0
    room[i] = size * mixed(edge, i, mix)
  }
  return room
}

function layOnFins(keep: DepositKeep, coat: Coat): void {
  const { deposit, onFins } = keep
  layFinShare(keep, coat.where.fins, deposit)
  const mix = fieldMix(coat.id, 1)
  const { hand } = surfaceNoise(keep)
  for (const i of onFins) deposit[i] = (deposit[i] ?? 0) * (1 + HAND.uneven * SWING * mixed(hand, i, mix))
}

function layDroplets(keep: DepositKeep, coat: Coat): void {
  const { deposit } = keep
  const mix = fieldMix(coat.id, 4)
  const { droplets } = surfaceNoise(keep)
  for (let i = 0; i < deposit.length; i++) {
    const x = deposit[i] ?? 0
    if (x <= 0) continue
    const drops = x + DROPLETS * Math.sqrt(x) * mixed(droplets, i, mix)
    deposit[i] = drops > 0 ? drops : 0
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
