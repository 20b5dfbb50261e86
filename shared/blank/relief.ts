import type { BlankShape } from './blank-shape'
import type { PreparedBlank } from './prepared-blank'
import { placeInSideView } from './surface-coordinates'
import { gillEdge } from './zones'

/** Carved lines of a head, ready to be asked sample by sample. */
export interface Relief {
  shape: BlankShape
  /** Half width of a carved line, mm. */
  line: number
  /** Nothing is carved behind this x, mm, or this u. */
  lastX: number
  lastU: number
  mouthEnd: number
  /** Eye centre on the left flank, mm. */
  eye: readonly [number, number, number]
}

/** What carving does at one place: slope toward the tail, slope in the side view, light kept. */
export interface ReliefPlace {
  slopeTail: number
  slopeX: number
  slopeY: number
  light: number
}

const STEP_SLOPE = 0.75
const GROOVE_SLOPE = 0.5
/** Light a carved line loses: in the crease itself, and softly round it. How wide both are, in half widths of the line. */
const CREASE = { width: 0.34, round: 1.15 }
const GILL_SHADE = { crease: 0.5, round: 0.3 }
const SECOND_SHADE = { crease: 0.3, round: 0.22 }
const MOUTH_SHADE = { crease: 0.55, round: 0.28 }
const SOCKET_SHADE = 0.5
/** The second line lies this far before the gill edge, share of the length, and is shorter at both ends. */
const SECOND_BEFORE = 0.068
const SECOND_SHORTER = 0.12

/** Where the head of a blank is carved. */
export function reliefOf(blank: PreparedBlank): Relief {
  const { shape } = blank
  const line = 0.62 * shape.length / 100 + 0.12
  const mouthEnd = Math.max(...shape.mouth.map(([x]) => x))
  const gillEnd = shape.gill.along + shape.gill.bulge
  return {
    shape, line, mouthEnd,
    lastU: gillEnd + 4 * line / shape.length,
    lastX: Math.max(shape.eye.x + 2 * shape.eye.radius, mouthEnd + 4 * line),
    eye: placeInSideView(blank, shape.eye.x, shape.eye.y, 1).position,
  }
}

/** 0 at both ends of a line, 1 between its first and last fifth. */
function fadedEnds(k: number): number {
  if (k <= 0 || k >= 1) return 0
  const f = Math.min(1, Math.min(k, 1 - k) * 5)
  return f * f * (3 - 2 * f)
}

/** Light kept at a distance from a crease, in half widths of the line; `deep` is how much of it is carved here. */
function kept(shade: { crease: number, round: number }, deep: number, off: number): number {
  const narrow = off / CREASE.width, wide = off / CREASE.round
  return (1 - shade.crease * deep * Math.exp(-narrow * narrow)) * (1 - shade.round * deep * Math.exp(-wide * wide))
}

function addGill(relief: Relief, u: number, v: number, out: ReliefPlace): void {
  const { gill, length } = relief.shape
  const edge = gillEdge(gill, v)
  const k = (v - gill.top) / (gill.bottom - gill.top)
  const step = fadedEnds(k)
  if (step > 0) {
    const d = (u - edge) * length / relief.line
    out.slopeTail += STEP_SLOPE * step * Math.exp(-d * d / 2)
    // The shade lies at the foot of the step, just behind it.
    out.light *= kept(GILL_SHADE, step, d - 0.62)
  }
  const second = fadedEnds((k - SECOND_SHORTER) / (1 - 2 * SECOND_SHORTER))
  if (second > 0) {
    const d = (u - edge + SECOND_BEFORE) * length / (0.8 * relief.line)
    const bell = Math.exp(-d * d / 2)
    out.slopeTail -= GROOVE_SLOPE * second * d * bell * 1.6
    out.light *= kept(SECOND_SHADE, second, d)
  }
}

function addMouth(relief: Relief, x: number, y: number, out: ReliefPlace): void {
  const { mouth } = relief.shape
  let [best, dx, dy, place] = [Infinity, 0, 0, 0]
  for (let i = 0; i + 1 < mouth.length; i++) {
    const [ax, ay] = mouth[i] as [number, number] // i and i + 1 lie on the line
    const [bx, by] = mouth[i + 1] as [number, number]
    const f = ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / ((bx - ax) ** 2 + (by - ay) ** 2)
    const g = Math.min(1, Math.max(0, f))
    const px = x - ax - g * (bx - ax)
    const py = y - ay - g * (by - ay)
    const d = px * px + py * py
    if (d < best) [best, dx, dy, place] = [d, px, py, (i + g) / (mouth.length - 1)]
  }
  const width = 0.62 * relief.line
  const q = best / (width * width)
  if (q > 12) return
  // A mouth is open at the nose: only its corner fades.
  const fade = Math.min(1, (1 - place) * 5) * Math.min(1, 0.5 + place * 2.5)
  const bell = Math.exp(-q / 2)
  out.slopeX -= GROOVE_SLOPE * fade * bell * 1.6 * dx / width
  out.slopeY -= GROOVE_SLOPE * fade * bell * 1.6 * dy / width
  out.light *= kept(MOUTH_SHADE, fade, Math.sqrt(q))
}

/** What carving does at a place of the skin: (x, y, z) mm with z ≥ 0, and its shares (u, v). */
export function reliefPlace(relief: Relief, x: number, y: number, z: number, u: number, v: number, out: ReliefPlace): void {
  out.slopeTail = 0
  out.slopeX = 0
  out.slopeY = 0
  out.light = 1
  if (u < relief.lastU) addGill(relief, u, v, out)
  if (x > relief.lastX) return
  if (x < relief.mouthEnd + 4 * relief.line) addMouth(relief, x, y, out)
  const radius = relief.shape.eye.radius
  const [ex, ey, ez] = relief.eye
  const outside = Math.sqrt((x - ex) ** 2 + (y - ey) ** 2 + (z - ez) ** 2) - radius
  if (outside > -0.2 * radius && outside < radius) {
    out.light *= 1 - SOCKET_SHADE * Math.exp(-Math.max(0, outside) / (0.18 * radius))
  }
}
