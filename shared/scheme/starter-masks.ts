import type { Place } from './mark'
import { MaskForm } from './mask'

/** A stencil or net every workshop starts with. */
export interface StarterMask { name: string, form: MaskForm }

/** Half the girth of a common body as a share of its length: makes shapes that are round in shares about round on the body. */
const HALF_GIRTH = 0.3

/**
 * Outline of a bar down a flank: at share u of the length, from v = top to v = bottom, `a` half its width at the top, `b` near
 * the bottom, `lean` how far its foot stands toward the tail (all shares). It narrows to a point and follows the body.
 */
export function bar(u: number, top: number, bottom: number, a: number, b: number, lean: number): Place[] {
  const height = bottom - top
  return [
    [u - a, top],
    [u - 0.9 * a + 0.3 * lean, top + 0.35 * height],
    [u - 0.7 * b + lean, bottom - 0.04],
    [u + 1.1 * lean, bottom],
    [u + 0.7 * b + lean, bottom - 0.05],
    [u + 0.95 * a + 0.3 * lean, top + 0.30 * height],
    [u + a, top],
  ]
}

const round = (value: number) => Math.round(value * 1e4) / 1e4
const steps = (count: number) => Array.from({ length: count }, (_, k) => k / (count - 1))
const arrayOf = <T>(count: number, make: (k: number) => T) => Array.from({ length: count }, (_, k) => make(k))

/** A round spot of a radius given as a share of the length. */
function spot(u: number, v: number, radius: number): Place[] {
  const corners = 16
  return arrayOf(corners, (k): Place => {
    const turn = 2 * Math.PI * k / corners
    return [round(u + radius * Math.cos(turn)), round(v + radius / HALF_GIRTH * Math.sin(turn))]
  })
}

/** A strip along a line; half its width at a share of the way, as a share of the length. */
function ribbon(line: (share: number) => Place, halfWidth: (share: number) => number, count = 28): Place[] {
  const edges = steps(count).map((at) => {
    const [u, v] = line(at)
    const [before, after] = [line(Math.max(0, at - 0.01)), line(Math.min(1, at + 0.01))]
    const du = after[0] - before[0]
    const dv = (after[1] - before[1]) * HALF_GIRTH
    const size = Math.hypot(du, dv)
    const [nu, nv] = [-dv / size * halfWidth(at), du / size / HALF_GIRTH * halfWidth(at)]
    return { left: [round(u + nu), round(v + nv)] as Place, right: [round(u - nu), round(v - nv)] as Place }
  })
  return [...edges.map(edge => edge.left), ...edges.toReversed().map(edge => edge.right)]
}

/** A crescent opening toward the nose: a scale's edge, or a gill cover's. */
function crescent(u: number, v: number, depth: number, height: number, width: number): Place[] {
  const line = (at: number): Place => [u - depth * (1 - Math.sin(Math.PI * (0.06 + 0.88 * at))), v + (at - 0.5) * height]
  return ribbon(line, at => width * (0.35 + 0.65 * Math.sin(Math.PI * at)), 22)
}

/** A tongue of fire: from a narrow foot through its belly to a tip that curls up toward the back. */
function tongue(u: number, v: number, length: number, width: number, curl: number): Place[] {
  const line = (at: number): Place => [u + length * at, v - curl * at * at + 0.035 * Math.sin(2 * Math.PI * at)]
  return ribbon(line, at => 0.0008 + width * 2.4 * Math.sqrt(at + 0.02) * (1 - at) ** 1.1)
}

const BARS: readonly Parameters<typeof bar>[] = [
  [0.30, 0.02, 0.60, 0.026, 0.010, 0.006], [0.395, 0.01, 0.72, 0.030, 0.011, 0.004], [0.485, 0.01, 0.74, 0.030, 0.012, 0],
  [0.575, 0.01, 0.72, 0.028, 0.011, -0.002], [0.66, 0.01, 0.70, 0.026, 0.010, -0.004], [0.745, 0.01, 0.68, 0.024, 0.010, -0.004],
  [0.825, 0.01, 0.66, 0.020, 0.010, -0.004],
]

const spots = () => arrayOf(22, (k) => {
  const row = k % 3
  const column = Math.floor(k / 3)
  return spot(0.30 + 0.082 * column + 0.027 * row, 0.24 + 0.115 * row + 0.02 * (column % 2), 0.0125 - 0.0006 * column)
})

const scaleRow = () => arrayOf(10, k => crescent(0.30 + 0.06 * k, 0.47, 0.026, 0.25 - 0.009 * k, 0.005))

const flames = () => [
  tongue(0.20, 0.235, 0.36, 0.010, 0.13), tongue(0.24, 0.355, 0.56, 0.013, 0.12), tongue(0.22, 0.47, 0.42, 0.014, 0.08),
  tongue(0.26, 0.60, 0.60, 0.013, 0.12), tongue(0.21, 0.72, 0.40, 0.011, 0.11),
]

const wormTracks = () => arrayOf(14, (k) => {
  const [row, column] = [k % 3, Math.floor(k / 3)]
  const [u, v] = [0.26 + 0.125 * column + 0.04 * row, 0.075 + 0.115 * row]
  const line = (at: number): Place => [
    u + 0.10 * at + 0.008 * Math.sin(2 * Math.PI * at + 2.1 * k), v + 0.032 * Math.sin(2 * Math.PI * (0.9 * at + 0.37 * k)),
  ]
  return ribbon(line, at => 0.0034 * (0.4 + 0.6 * Math.sin(Math.PI * at) ** 0.5))
})

const stencil = (name: string, outlines: Place[][], soft: number, wobble: number): StarterMask =>
  ({ name, form: MaskForm.parse({ kind: 'stencil', does: 'opens', outlines, soft, wobble }) })

const mesh = (name: string, weave: 'hexagon' | 'diamond', pitch: number, thread: number): StarterMask =>
  ({ name, form: MaskForm.parse({ kind: 'mesh', weave, pitch, thread }) })

/** The nets and stencils a new workshop finds in its drawer. Pitches: common practice, about twice the scale count of the fish. */
export const STARTER_MASKS: readonly StarterMask[] = [
  mesh('Fine hex net', 'hexagon', 2, 0.32),
  mesh('Wide hex net', 'hexagon', 4, 0.62),
  mesh('Diamond net', 'diamond', 3.4, 0.3),
  stencil('Bars', BARS.map(numbers => bar(...numbers)), 0.55, 0.5),
  stencil('Spots', spots(), 0.14, 0),
  stencil('Gill cover', [crescent(0.25, 0.52, 0.085, 0.62, 0.013)], 0.3, 0),
  stencil('Scale row', scaleRow(), 0.14, 0),
  stencil('Flames', flames(), 0.3, 0),
  stencil('Worm tracks', wormTracks(), 0.14, 0.3),
]
