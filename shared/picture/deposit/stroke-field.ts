import { binAt, binned } from './bins'
import { noise2, SWING } from './noise'
import { normalShare, smoothStep } from './normal-share'
import type { PlaneField } from './plane-field'
import type { PlanePoint } from './plane-place'

/** A line on the flat surface, mm; width and amount run evenly from its start to its end. */
export interface PlaneStroke {
  points: readonly PlanePoint[]
  /** Airbrush: the bell's σ. Brush: half the width. mm. */
  width: readonly [number, number]
  amount: readonly [number, number]
}

const NUMBERS = 10
const BELL_REACH = 3.8
const BRUSH_SOFT = 0.05
/** How far a hand strays from its line, over how many mm, how its width comes and goes; a brush is steadier. Chosen by eye. */
const HAND = { strays: 0.13 * SWING, over: 5.5, width: 0.12 * SWING, widthOver: 2.4, brush: 0.4 }
/** The trigger is opened and closed on the move: over so many widths of the line, but no more than a share of it. */
const TRIGGER = { open: 2, openMost: 0.1, close: 8, closeMost: 0.35 }

/**
 * Lines of an airbrush (amount · exp(-d²/2w²), lines add up; a pass across holds w·√2π) or of a brush (amount within w of the
 * line, edge .05 mm, lines cover each other).
 *
 * @param hand seed of the hand that draws: its lines stray a little and run out thin; without one they are ruled
 */
export function strokeField(strokes: readonly PlaneStroke[], tool: 'airbrush' | 'brush', hand?: number): PlaneField {
  const segments: number[] = []
  const owner: number[] = []
  const boxes: number[] = []
  strokes.forEach((stroke, k) => {
    const total = lengthOf(stroke.points)
    let run = 0
    for (let i = 0; i + 1 < stroke.points.length; i++) {
      const [a, b] = [stroke.points[i] ?? [0, 0], stroke.points[i + 1] ?? [0, 0]]
      const step = Math.hypot(b[0] - a[0], b[1] - a[1])
      const share = (ends: readonly [number, number], at: number) => ends[0] + (ends[1] - ends[0]) * (total > 0 ? at / total : 0)
      const [w0, w1] = [share(stroke.width, run), share(stroke.width, run + step)]
      segments.push(a[0], a[1], b[0], b[1], w0, w1, share(stroke.amount, run), share(stroke.amount, run + step), run, total - run)
      owner.push(k)
      run += step
      const reach = tool === 'airbrush' ? BELL_REACH * Math.max(w0, w1) : Math.max(w0, w1) + 4 * BRUSH_SOFT
      boxes.push(Math.min(a[0], b[0]) - reach, Math.min(a[1], b[1]) - reach, Math.max(a[0], b[0]) + reach, Math.max(a[1], b[1]) + reach)
    }
  })
  const bins = binned(boxes)
  const lines = Float64Array.from(segments)
  const owners = Int32Array.from(owner)
  const isBell = tool === 'airbrush'
  const steady = isBell ? 1 : HAND.brush
  const at = (atU: number, atV: number) => {
    const bin = binAt(bins, atU, atV)
    if (bin < 0) return 0
    const end = bins.start[bin + 1] ?? 0
    if (bins.start[bin] === end) return 0
    let [U, V, breadth] = [atU, atV, 1]
    if (hand !== undefined) {
      U += steady * HAND.strays * noise2(atU / HAND.over, atV / HAND.over, hand)
      V += steady * HAND.strays * noise2(atU / HAND.over, atV / HAND.over, hand + 1)
      breadth += steady * HAND.width * noise2(atU / HAND.widthOver, atV / HAND.widthOver, hand + 2)
    }
    let sum = 0
    let own = -1
    let best = Infinity
    let strength = 0
    for (let k = bins.start[bin] ?? 0; k < end; k++) {
      const item = bins.items[k] ?? 0
      if (owners[item] !== own) {
        sum = isBell ? sum + bell(best, strength) : Math.max(sum, brushed(best, strength))
        own = owners[item] ?? 0
        best = Infinity
      }
      const s = NUMBERS * item
      const ax = (lines[s] ?? 0) - U
      const ay = (lines[s + 1] ?? 0) - V
      const ex = (lines[s + 2] ?? 0) - U - ax
      const ey = (lines[s + 3] ?? 0) - V - ay
      const size = ex * ex + ey * ey
      const t = size > 0 ? Math.min(1, Math.max(0, -(ax * ex + ay * ey) / size)) : 0
      const dx = ax + t * ex
      const dy = ay + t * ey
      const width = breadth * ((lines[s + 4] ?? 0) + ((lines[s + 5] ?? 0) - (lines[s + 4] ?? 0)) * t)
      const d = dx * dx + dy * dy
      const far = isBell ? d / (2 * width * width) : Math.sqrt(d) - width
      if (far < best) {
        best = far
        strength = (lines[s + 6] ?? 0) + ((lines[s + 7] ?? 0) - (lines[s + 6] ?? 0)) * t
        if (hand !== undefined && isBell) {
          const step = t * Math.sqrt(size)
          strength *= triggered((lines[s + 8] ?? 0) + step, (lines[s + 9] ?? 0) - step, width)
        }
      }
    }
    return isBell ? sum + bell(best, strength) : Math.max(sum, brushed(best, strength))
  }
  return { at, meets: isBell ? 'add' : 'cover' }
}

/** How far the trigger is open, `from` mm after the start of a line and `left` mm before its end. */
function triggered(from: number, left: number, width: number): number {
  const length = from + left
  return smoothStep(0, Math.min(TRIGGER.open * width, TRIGGER.openMost * length), from)
    * Math.sqrt(smoothStep(0, Math.min(TRIGGER.close * width, TRIGGER.closeMost * length), left))
}

const bell = (q: number, amount: number) => (q < BELL_REACH * BELL_REACH / 2 ? amount * Math.exp(-q) : 0)

const brushed = (past: number, amount: number) => amount * normalShare(-past / BRUSH_SOFT)

function lengthOf(points: readonly PlanePoint[]): number {
  let sum = 0
  for (let i = 0; i + 1 < points.length; i++) {
    const [a, b] = [points[i] ?? [0, 0], points[i + 1] ?? [0, 0]]
    sum += Math.hypot(b[0] - a[0], b[1] - a[1])
  }
  return sum
}
