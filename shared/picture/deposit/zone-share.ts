import { BACK_EDGE, BELLY_EDGE, GILL_COVER_LENGTH, TAIL_START } from '#shared/blank/zones'
import type { Where, ZoneName } from '#shared/scheme/coat'
import type { DepositKeep } from './keep'
import { normalShare } from './normal-share'

/** Width of a hard edge, mm. */
export const HARD_FADE = 0.06
/** Width of a fading edge nobody gave, share of the length. */
export const DEFAULT_FADE = 0.05

const GIRTH: readonly (readonly [ZoneName, number, number])[] = [
  ['back', -Infinity, BACK_EDGE], ['upper flank', BACK_EDGE, 0.5], ['lower flank', 0.5, BELLY_EDGE], ['belly', BELLY_EDGE, Infinity],
]

/** Width of a coat's edge, mm. */
export function edgeFade(where: Where, length: number): number {
  if (where.edge === 'hard') return HARD_FADE
  return Math.max(HARD_FADE, where.fade ?? DEFAULT_FADE * length)
}

/** The chosen zones round the girth as ranges of v from back to belly; neighbours are one range, without an edge between. */
export function girthRanges(zones: readonly ZoneName[]): [from: number, to: number][] {
  const ranges: [number, number][] = []
  for (const [zone, from, to] of GIRTH) {
    if (!zones.includes(zone)) continue
    const last = ranges.at(-1)
    if (last?.[1] === from) last[1] = to
    else ranges.push([from, to])
  }
  return ranges
}

/** False when the chosen zones leave the whole body to a coat. */
export function hasEdge(zones: readonly ZoneName[]): boolean {
  return girthRanges(zones).some(([from, to]) => from > -Infinity || to < Infinity) || alongShare(zones) !== null
}

/**
 * How much of a coat its zones let through at each sample of the body, 0 to 1, into `out`: zones round the girth times zones
 * along the body times the limits along the body. `times` widens the fades; `wander` (mm per sample) moves the edges.
 */
export function layZoneShare(keep: DepositKeep, where: Where, times: number, wander: Float32Array | null, out: Float32Array): void {
  const softness = edgeFade(where, keep.blank.shape.length) * times / 2
  const { onBody } = keep
  if (hasEdge(where.zones)) {
    const ranges = Float64Array.from(girthRanges(where.zones).flat())
    const along = alongShare(where.zones)
    for (let k = 0; k < onBody.length; k++) {
      const i = onBody[k] ?? 0
      const grow = where.reach + (wander ? wander[i] ?? 0 : 0)
      let share = girthShare(ranges, keep.samples.v[i] ?? 0, keep.girth[i] ?? 0, grow, softness)
      if (share > 0 && along) share *= along(keep, i, grow, softness)
      out[i] = share
    }
  }
  else for (let k = 0; k < onBody.length; k++) out[onBody[k] ?? 0] = 1
  if (where.along) limitAlong(keep, where.along, times, out)
}

function girthShare(ranges: Float64Array, v: number, girth: number, grow: number, softness: number): number {
  if (ranges.length === 0) return 1
  let share = 0
  for (let r = 0; r < ranges.length; r += 2) {
    const within = normalShare((((ranges[r + 1] ?? 0) - v) * girth + grow) / softness)
      - normalShare((((ranges[r] ?? 0) - v) * girth - grow) / softness)
    if (within > 0) share += within
  }
  return share < 1 ? share : 1
}

function limitAlong(keep: DepositKeep, limits: NonNullable<Where['along']>, times: number, out: Float32Array): void {
  const { length } = keep.blank.shape
  const softness = (fade: number) => Math.max(HARD_FADE, fade) * times / 2
  const [fromSoft, toSoft] = [softness(limits.fadeFrom), softness(limits.fadeTo)]
  for (const i of keep.onBody) {
    const u = keep.samples.u[i] ?? 0
    // A limit at nose or tail is none.
    const from = limits.from > 0 ? normalShare((u - limits.from) * length / fromSoft) : 1
    const to = limits.to < 1 ? normalShare((limits.to - u) * length / toSoft) : 1
    out[i] = (out[i] ?? 0) * from * to
  }
}

type AlongShare = (keep: DepositKeep, i: number, grow: number, softness: number) => number

/** Share of the chosen zones along the body, or null when they set no limit. */
function alongShare(zones: readonly ZoneName[]): AlongShare | null {
  const [head, gill, trunk, tail] = (['head', 'gill cover', 'trunk', 'tail'] as const).map(zone => zones.includes(zone))
  if (head && trunk) return null
  // The tail is the end of the trunk, the gill cover the end of the head.
  if (trunk) return gill ? trunkAndGillCover : trunkShare
  const front = head ? headShare : gill ? gillCoverShare : null
  if (!tail) return front
  if (!front) return tailShare
  return (keep, i, grow, softness) => Math.min(1, front(keep, i, grow, softness) + tailShare(keep, i, grow, softness))
}

const headShare: AlongShare = (keep, i, grow, softness) => normalShare(((keep.ahead[i] ?? 0) + grow) / softness)

const trunkShare: AlongShare = (keep, i, grow, softness) => normalShare((grow - (keep.ahead[i] ?? 0)) / softness)

const tailShare: AlongShare = (keep, i, grow, softness) =>
  normalShare((((keep.samples.u[i] ?? 0) - TAIL_START) * keep.blank.shape.length + grow) / softness)

function gillHeight(keep: DepositKeep, i: number, grow: number, softness: number): number {
  const { top, bottom } = keep.blank.shape.gill
  const v = keep.samples.v[i] ?? 0
  const girth = keep.girth[i] ?? 0
  return Math.max(0, normalShare(((v - top) * girth + grow) / softness) - normalShare(((v - bottom) * girth - grow) / softness))
}

function behindCoverStart(keep: DepositKeep, i: number, grow: number, softness: number): number {
  return normalShare((GILL_COVER_LENGTH * keep.blank.shape.length + grow - (keep.ahead[i] ?? 0)) / softness)
}

const gillCoverShare: AlongShare = (keep, i, grow, softness) => gillHeight(keep, i, grow, softness)
  * Math.max(0, headShare(keep, i, grow, softness) + behindCoverStart(keep, i, grow, softness) - 1)

const trunkAndGillCover: AlongShare = (keep, i, grow, softness) => {
  const trunk = trunkShare(keep, i, grow, softness)
  return trunk + gillHeight(keep, i, grow, softness) * (behindCoverStart(keep, i, grow, softness) - trunk)
}
