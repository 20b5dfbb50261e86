import { rayAngle, type FinOutline } from '#shared/blank/fin-outline'
import { PART_FIN } from '#shared/blank/view-sample-lists'
import type { Where } from '#shared/scheme/coat'
import { keptMap, type DepositKeep } from './keep'
import { hashShare, noise2, SWING } from './noise'
import { normalShare, smoothStep } from './normal-share'

type FinPaint = Where['fins'][number]

/** Widths nobody gave, mm at a body of 100 mm. */
const WIDTH = { 'rays': 0.45, 'leading edge': 0.9, 'rim': 0.9, 'spots': 0.55 }
const EDGE_SOFT = 0.08
/**
 * A ray's line: how much thinner it is at the tip, how far its two branches part there (share of the way to the next ray) and from
 * where, how far it sways, how unlike rays are, and from where it runs out before the rim. Chosen by eye.
 */
const RAY = { thins: 0.5, parts: 0.13, from: 0.35, fromVaries: 0.6, sways: 0.05 * SWING, swaysOver: 4, varies: 0.35, endsFrom: 0.78, ends: 0.5 }
/** A rim is misted on: how soft, as a share of its width. */
const RIM_SOFT = 0.35
/** Spots stand in bows across the rays: rows and gaps in widths of a spot, and their length along the ray. */
const SPOT = { row: 5.2, gap: 4.2, long: 2.4, missing: 0.14, strays: 0.9, smallest: 0.6 }

/** How much of a coat lies on the fins at each fin sample, 0 to 1, into `out`; where entries meet, the stronger counts. */
export function layFinShare(keep: DepositKeep, fins: Where['fins'], out: Float32Array): void {
  const { part, rootToTip } = keep.samples
  for (const i of keep.onFins) out[i] = 0
  for (const paint of fins) {
    const on = paint.on === 'whole' ? null : finMap(keep, paint.on, paint.width ?? WIDTH[paint.on] * keep.blank.shape.length / 100)
    for (const i of keep.onFins) {
      const fin = keep.blank.fins[(part[i] ?? 0) - PART_FIN]
      if (!fin || (paint.fin !== 'all' && paint.fin !== fin.id)) continue
      const amount = paint.root + (paint.tip - paint.root) * (rootToTip[i] ?? 0)
      out[i] = Math.max(out[i] ?? 0, amount * (on ? on[i] ?? 0 : 1))
    }
  }
}

function finMap(keep: DepositKeep, on: Exclude<FinPaint['on'], 'whole'>, width: number): Float32Array {
  return keptMap(keep, 'marks', `fins ${on} ${width}`, () => {
    const out = new Float32Array(keep.samples.count)
    const { U, V, part, rim, rootToTip } = keep.samples
    const edges = keep.blank.fins.map(fin => (on === 'leading edge' ? leadingEdges(fin) : []))
    for (const i of keep.onFins) {
      const index = (part[i] ?? 0) - PART_FIN
      const fin = keep.blank.fins[index]
      if (!fin) continue
      const x = fin.rootX + (U[i] ?? 0)
      const y = fin.rootY + (V[i] ?? 0)
      switch (on) {
        case 'rays':
          out[i] = rayShare(fin, x, y, width, rootToTip[i] ?? 0)
          break
        case 'leading edge':
          out[i] = normalShare((width - distanceTo(fin, edges[index] ?? [], x, y)) / EDGE_SOFT)
          break
        case 'rim':
          out[i] = normalShare((width - (rim[i] ?? 0)) / (RIM_SOFT * width))
          break
        case 'spots':
          out[i] = spotShare(fin, x, y, width, index)
          break
      }
    }
    return out
  })
}

/** A soft line `width` mm wide in the valley beside each ray, parting in two toward the tip; nothing on a smooth fin. */
function rayShare(fin: FinOutline, x: number, y: number, width: number, toTip: number): number {
  if (fin.raysPerRadian === 0) return 0
  const ray = (rayAngle(fin, x, y) - fin.firstRay) * fin.raysPerRadian
  const own = Math.round(ray)
  const radius = Math.hypot(x - fin.originX, y - fin.originY)
  const from = RAY.from + RAY.fromVaries * hashShare(own, 5, 719)
  const off = Math.abs(ray - own + RAY.sways * noise2(radius / RAY.swaysOver, 3 * own, 709))
  const parted = Math.abs(off - RAY.parts * smoothStep(from, from + 1 - RAY.from, toTip))
  const q = 2 * parted / fin.raysPerRadian * radius / (width * (1 - RAY.thins * toTip))
  const strength = (1 - RAY.varies * hashShare(own, 3, 719)) * (1 - RAY.ends * smoothStep(RAY.endsFrom, 1, toTip))
  return strength * Math.exp(-q * q / 2)
}

type Run = readonly [from: number, to: number]

/** The parts of an outline that go first through the water: the front edge, or both outer edges of a tail. */
function leadingEdges(fin: FinOutline): Run[] {
  const last = fin.xs.length - 1
  const [x0, y0, x1, y1] = [fin.xs[0] ?? 0, fin.ys[0] ?? 0, fin.xs[last] ?? 0, fin.ys[last] ?? 0]
  const best = (score: (k: number) => number) => {
    let at = 0
    for (let k = 1; k <= last; k++) if (score(k) > score(at)) at = k
    return at
  }
  const isTail = Math.abs(x1 - x0) < Math.abs(y1 - y0)
  if (isTail) {
    const up = Math.sign(y0 - y1)
    return [[0, best(k => up * (fin.ys[k] ?? 0))], [best(k => -up * (fin.ys[k] ?? 0)), last]]
  }
  const tip = best(k => Math.abs((fin.xs[k] ?? 0) * (y1 - y0) - (fin.ys[k] ?? 0) * (x1 - x0) - x0 * (y1 - y0) + y0 * (x1 - x0)))
  return x0 < x1 ? [[0, tip]] : [[tip, last]]
}

function distanceTo(fin: FinOutline, runs: readonly Run[], x: number, y: number): number {
  let best = Infinity
  for (const [from, to] of runs) {
    for (let k = from; k < to; k++) {
      const ax = (fin.xs[k] ?? 0) - x
      const ay = (fin.ys[k] ?? 0) - y
      const ex = (fin.xs[k + 1] ?? 0) - x - ax
      const ey = (fin.ys[k + 1] ?? 0) - y - ay
      const size = ex * ex + ey * ey
      const t = size > 0 ? Math.min(1, Math.max(0, -(ax * ex + ay * ey) / size)) : 0
      best = Math.min(best, (ax + t * ex) ** 2 + (ay + t * ey) ** 2)
    }
  }
  return Math.sqrt(best)
}

/** Spots in bows round the place where the rays meet, longer along the rays, each a little out of place. */
function spotShare(fin: FinOutline, x: number, y: number, width: number, seed: number): number {
  const radius = Math.hypot(x - fin.originX, y - fin.originY)
  const angle = rayAngle(fin, x, y)
  const height = radius / (SPOT.row * width)
  const row = Math.floor(height)
  const bow = (row + 0.5) * SPOT.row * width
  const across = angle * bow / (SPOT.gap * width) + (row & 1) * 0.5
  const column = Math.floor(across)
  const draw = (use: number) => hashShare(row, column * 8 + use, 701 + seed)
  if (draw(0) < SPOT.missing) return 0
  const size = SPOT.smallest + (1 - SPOT.smallest) * draw(1)
  const stray = (use: number, room: number) => 0.5 + SPOT.strays * room * (draw(use) - 0.5)
  const dx = (across - column - stray(2, 0.5)) * SPOT.gap * width
  const dy = (height - row - stray(3, 0.17)) * SPOT.row * width
  const d = Math.hypot(dx, dy / SPOT.long)
  return normalShare((size * width * 0.9 - d) / EDGE_SOFT)
}
