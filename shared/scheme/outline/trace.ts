import { POINTS_MAX, type Place, type Stroke } from '../mark'
import type { FlatPoint } from './flat'
import { simplifyTo } from './simplify-line'

/** One place a pointer went over: on the body, laid out flat (mm), and how hard it was pressed, 0 to 1 (½ where nothing tells). */
export interface TracePoint { place: Place, flat: FlatPoint, pressure: number }

/** How far a kept line may lie from the hand's, mm. */
export const TRACE_TOLERANCE = 0.1
/** Pressed fully a tool lays twice its width, hardly pressed a fifth of it. */
const PRESSED = { least: 0.2, most: 2 } as const

/** A line as it is kept, and how far it may lie from what was drawn, mm. */
export interface TracedLine { points: Place[], tolerance: number }

/** A drawn line with no more places than it needs; null where the pointer did not get anywhere. */
export function tracedLine(trace: readonly TracePoint[], isClosed = false): TracedLine | null {
  const { kept, tolerance } = simplifyTo(trace.map(point => point.flat), TRACE_TOLERANCE, POINTS_MAX, isClosed)
  const points = kept.flatMap(i => trace[i] ? [trace[i].place] : [])
  const [first] = trace
  const isSomewhere = first !== undefined && trace.some(({ flat }) => Math.hypot(flat[0] - first.flat[0], flat[1] - first.flat[1]) > TRACE_TOLERANCE)
  return isSomewhere && points.length >= (isClosed ? 3 : 2) ? { points, tolerance } : null
}

/** A width for a pressure: as set at ½, so that a mouse draws as set. */
export function pressedWidth(width: number, pressure: number): number {
  const p = Math.min(1, Math.max(0, pressure))
  return width * (p < 0.5 ? PRESSED.least + (1 - PRESSED.least) * 2 * p : 1 + (PRESSED.most - 1) * (2 * p - 1))
}

/**
 * Widths at the start and the end of a line, from how hard it was pressed on the way: the straight run that fits best (least squares
 * over the length), since a stroke's width runs evenly from end to end.
 */
export function pressedEnds(trace: readonly TracePoint[], width: number): [number, number] {
  const run: number[] = []
  trace.forEach(({ flat }, i) => {
    const before = trace[i - 1]?.flat ?? flat
    run.push((run[i - 1] ?? 0) + Math.hypot(flat[0] - before[0], flat[1] - before[1]))
  })
  const total = run.at(-1) ?? 0
  const widths = trace.map(point => pressedWidth(width, point.pressure))
  const mean = (values: readonly number[]) => values.reduce((sum, each) => sum + each, 0) / Math.max(1, values.length)
  const shares = run.map(each => total > 0 ? each / total : 0)
  const [middle, usual] = [mean(shares), mean(widths)]
  const spread = mean(shares.map(share => (share - middle) ** 2))
  const slope = spread > 1e-9 ? mean(shares.map((share, i) => (share - middle) * ((widths[i] ?? usual) - usual))) / spread : 0
  const held = (value: number) => Math.round(Math.min(40, Math.max(0.02, value)) * 1000) / 1000
  return [held(usual - slope * middle), held(usual + slope * (1 - middle))]
}

/** A stroke along a line. */
export function strokeAlong(points: readonly Place[], width: readonly [number, number], amount: readonly [number, number] = [1, 1]): Stroke {
  return { points: [...points], width: [...width], amount: [...amount] }
}
