import type { Fin } from './blank-shape'
import { contourAt, type Profile } from './profile'

const STEPS_PER_SPAN = 6
const RAY_BINS = 96

/** A fin ready to be drawn: its outline on the body, mm, and how far it reaches along each ray. */
export interface FinOutline {
  id: string
  /** x and y of the closed outline, root to root, body mm. The closing edge (last to first) is the root. */
  xs: Float64Array
  ys: Float64Array
  left: number
  right: number
  low: number
  high: number
  /** Ends of the root along the body. */
  rootLeft: number
  rootRight: number
  /** The fin's own zero on the body. */
  rootX: number
  rootY: number
  /** Where the rays meet, body mm; inside the body. */
  originX: number
  originY: number
  /** Rays to the radian, and the angle of the first; 0 on a smooth fin. */
  raysPerRadian: number
  firstRay: number
  /** Nearest and farthest radius of the fin at angles `binStart + i·binStep`, radians. */
  binStart: number
  binStep: number
  rootRadius: Float64Array
  tipRadius: Float64Array
}

/** What a place in the plane of a fin is to the fin. */
export interface FinPlace {
  /** mm to the rim, + inside the outline. */
  rim: number
  /** Unit direction to the nearest rim. */
  rimX: number
  rimY: number
}

function catmullRom(points: readonly (readonly [number, number])[]): [number[], number[]] {
  const xs: number[] = []
  const ys: number[] = []
  const last = points.length - 1
  const at = (i: number) => points[Math.min(last, Math.max(0, i))] ?? [0, 0]
  for (let i = 0; i < last; i++) {
    const [a, b, c, d] = [at(i - 1), at(i), at(i + 1), at(i + 2)]
    for (let k = 0; k < STEPS_PER_SPAN; k++) {
      const f = k / STEPS_PER_SPAN
      const blend = (p: number, q: number, r: number, s: number) =>
        q + 0.5 * f * (r - p + f * (2 * p - 5 * q + 4 * r - s + f * (3 * (q - r) + s - p)))
      xs.push(blend(a[0], b[0], c[0], d[0]))
      ys.push(blend(a[1], b[1], c[1], d[1]))
    }
  }
  xs.push(at(last)[0])
  ys.push(at(last)[1])
  return [xs, ys]
}

/** Radius at which a ray at `angle` from the origin crosses the segment, or -1. */
function crossing(ox: number, oy: number, angle: number, ax: number, ay: number, bx: number, by: number): number {
  const [dx, dy, ex, ey] = [Math.cos(angle), Math.sin(angle), bx - ax, by - ay]
  const det = dx * ey - dy * ex
  if (Math.abs(det) < 1e-12) return -1
  const along = ((ax - ox) * ey - (ay - oy) * ex) / det
  const share = ((ax - ox) * dy - (ay - oy) * dx) / det
  return along > 0 && share >= -1e-9 && share <= 1 + 1e-9 ? along : -1
}

/** Places a fin on a body and measures its reach along its rays. */
export function finOutline(fin: Fin, profile: Profile): FinOutline {
  const base = (x: number) => {
    if (fin.measuredFrom === 'point') return fin.y
    const contour = contourAt(profile, Math.min(profile.length, Math.max(0, x)))
    return fin.measuredFrom === 'back' ? contour.back : contour.belly
  }
  const [xList, yList] = catmullRom(fin.outline.map(([x, y]) => [fin.x + x, base(fin.x + x) + y]))
  const xs = Float64Array.from(xList)
  const ys = Float64Array.from(yList)
  const last = xs.length - 1
  const rootY = base(fin.x)
  const [ax, ay, bx, by] = [xs[last] ?? 0, ys[last] ?? 0, xs[0] ?? 0, ys[0] ?? 0]
  const middleX = (ax + bx) / 2
  const middleY = (ay + by) / 2
  // A smooth fin has no rays of its own: let them meet one root's length inside the body.
  const outX = xs.reduce((sum, x) => sum + x, 0) / xs.length - middleX
  const outY = ys.reduce((sum, y) => sum + y, 0) / ys.length - middleY
  const inward = Math.hypot(bx - ax, by - ay) / Math.max(1e-9, Math.hypot(outX, outY))
  const originX = fin.rays ? fin.x + fin.rays.originX : middleX - outX * inward
  const originY = fin.rays ? rootY + fin.rays.originY : middleY - outY * inward
  const middleAngle = Math.atan2(middleY - originY, middleX - originX)
  const turned = (x: number, y: number) => {
    const angle = Math.atan2(y - originY, x - originX) - middleAngle
    return middleAngle + angle - 2 * Math.PI * Math.round(angle / (2 * Math.PI))
  }
  let [binStart, binEnd] = [Infinity, -Infinity]
  xs.forEach((x, i) => {
    const angle = turned(x, ys[i] ?? 0)
    binStart = Math.min(binStart, angle)
    binEnd = Math.max(binEnd, angle)
  })
  const binStep = Math.max(1e-6, (binEnd - binStart) / (RAY_BINS - 1))
  const rootRadius = new Float64Array(RAY_BINS)
  const tipRadius = new Float64Array(RAY_BINS)
  const rootFar = Math.hypot(middleX - originX, middleY - originY)
  for (let i = 0; i < RAY_BINS; i++) {
    // The outermost rays only graze the outline.
    const angle = binStart + binStep * Math.min(RAY_BINS - 1.01, Math.max(0.01, i))
    const root = crossing(originX, originY, angle, ax, ay, bx, by)
    rootRadius[i] = root > 0 ? root : rootFar
    let tip = 0
    for (let k = 0; k < last; k++) {
      tip = Math.max(tip, crossing(originX, originY, angle, xs[k] ?? 0, ys[k] ?? 0, xs[k + 1] ?? 0, ys[k + 1] ?? 0))
    }
    tipRadius[i] = Math.max(tip, (rootRadius[i] ?? 0) + 0.1)
  }
  const radians = (degrees: number) => degrees * Math.PI / 180
  const span = fin.rays ? radians(fin.rays.toAngle - fin.rays.fromAngle) : 0
  return {
    id: fin.id, xs, ys,
    left: Math.min(...xs), right: Math.max(...xs), low: Math.min(...ys), high: Math.max(...ys),
    rootLeft: Math.min(ax, bx), rootRight: Math.max(ax, bx),
    rootX: fin.x, rootY, originX, originY,
    raysPerRadian: fin.rays && span !== 0 ? fin.rays.count / span : 0,
    firstRay: fin.rays ? radians(fin.rays.fromAngle) : 0,
    binStart, binStep, rootRadius, tipRadius,
  }
}

/** Distance to the rim at a place in the plane of a fin. The root does not count as rim. */
export function finPlace(fin: FinOutline, x: number, y: number, out: FinPlace): void {
  const { xs, ys } = fin
  const last = xs.length - 1
  let best = Infinity
  let isInside = false
  let [toX, toY] = [0, 0]
  for (let k = 0; k <= last; k++) {
    const ax = xs[k] as number // k and its follower lie within the outline
    const ay = ys[k] as number
    const j = k === last ? 0 : k + 1
    const ex = (xs[j] as number) - ax
    const ey = (ys[j] as number) - ay
    const px = x - ax
    const py = y - ay
    if ((py < 0) !== (py < ey) && (px < py * ex / ey)) isInside = !isInside
    if (k === last) continue
    const f = (px * ex + py * ey) / (ex * ex + ey * ey)
    const g = f < 0 ? 0 : f > 1 ? 1 : f
    const qx = g * ex - px
    const qy = g * ey - py
    const d = qx * qx + qy * qy
    if (d < best) {
      best = d
      toX = qx
      toY = qy
    }
  }
  const distance = Math.sqrt(best)
  const sign = isInside ? 1 : -1
  out.rim = sign * distance
  const scale = distance > 0 ? sign / distance : 0
  out.rimX = toX * scale
  out.rimY = toY * scale
}

/** Angle of the ray through a place, radians, within the fin's own span. */
export function rayAngle(fin: FinOutline, x: number, y: number): number {
  const angle = Math.atan2(y - fin.originY, x - fin.originX) - fin.binStart
  return fin.binStart + angle - 2 * Math.PI * Math.floor((angle + 0.5) / (2 * Math.PI))
}

/** Root-to-tip share of a place on a fin, 0 at the root, 1 at the rim, along its ray. */
export function rootToTip(fin: FinOutline, x: number, y: number, angle: number): number {
  const radius = Math.hypot(x - fin.originX, y - fin.originY)
  const at = Math.min(RAY_BINS - 1.001, Math.max(0, (angle - fin.binStart) / fin.binStep))
  const i = Math.floor(at)
  const f = at - i
  const root = (fin.rootRadius[i] ?? 0) * (1 - f) + (fin.rootRadius[i + 1] ?? 0) * f
  const tip = (fin.tipRadius[i] ?? 1) * (1 - f) + (fin.tipRadius[i + 1] ?? 1) * f
  return Math.min(1, Math.max(0, (radius - root) / (tip - root)))
}
