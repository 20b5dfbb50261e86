import type { Mark, Place } from '#shared/scheme/mark'
import { dotField, placedDots, scatteredDots } from './dot-field'
import { keptMap, type DepositKeep } from './keep'
import { hashShare } from './noise'
import { cutEdge, outlineReach } from './mask-map'
import { outlineField } from './outline-field'
import { spongeMap, wormMap } from './pattern-map'
import { fieldMap, type PlaneField } from './plane-field'
import { draped, planePlace, type PlanePoint } from './plane-place'
import { strokeField, type PlaneStroke } from './stroke-field'

/** Strokes of a fan run together at its root; a hand flicks them off lightly there. 0: they add up in full; 1: no more than one. */
const FLICK = 0.75
/** No two strokes of a hand are as long. */
const FAN_VARIES = 0.035
/** The outermost strokes of a fan are lifted sooner, so that it ends round. */
const FAN_ROUND = 0.16
/** The two flanks are drawn one after the other: no hand does the same twice. */
const HANDS = 733

/**
 * How much the marks of a coat lay at every sample of the body, as shares of the coat, into `out`. Marks of one coat come one
 * after the other from the same cup: airbrushed ones add up, what covers covers.
 */
export function layMarks(keep: DepositKeep, marks: readonly Mark[], seed: number, out: Float32Array): void {
  out.fill(0)
  marks.forEach((mark, order) => {
    const map = markMap(keep, mark, seed + order)
    if (meetsByAdding(mark)) for (const i of keep.onBody) out[i] = (out[i] ?? 0) + (map[i] ?? 0)
    else for (const i of keep.onBody) out[i] = Math.max(out[i] ?? 0, map[i] ?? 0)
  })
}

function meetsByAdding(mark: Mark): boolean {
  return mark.kind === 'fan' || (mark.kind === 'strokes' && mark.with === 'airbrush')
}

function markMap(keep: DepositKeep, mark: Mark, seed: number): Float32Array {
  // Only freehand edges depend on the coat that draws them.
  const key = JSON.stringify(mark.kind === 'outline' ? [mark, seed] : mark)
  return keptMap(keep, 'marks', key, () => drawMark(keep, mark, seed))
}

function drawMark(keep: DepositKeep, mark: Mark, seed: number): Float32Array {
  const { table } = keep.blank
  const only = 'only' in mark ? mark.only : undefined
  /** A flank that does not carry the mark has nothing of its own; what crosses the ridge still reaches it. */
  const on = (field: PlaneField, side: 'left' | 'right') => only === undefined || only === side ? field : { ...field, at: () => 0 }
  const bothSides = (field: (side: 1 | -1) => PlaneField) => fieldMap(keep, on(field(1), 'left'), on(field(-1), 'right'))
  switch (mark.kind) {
    case 'strokes': {
      const strokes = mark.strokes.map(stroke => ({ ...stroke, points: draped(table, stroke.points, false) }))
      return bothSides(side => strokeField(strokes, mark.with, HANDS + side))
    }
    case 'fan': {
      const root = planePlace(table, ...mark.root)
      return bothSides(side => fanField(root, mark, keep.blank.shape.length, HANDS + side))
    }
    case 'dots': return bothSides(side => dotField(placedDots(table, mark, side), mark.soft))
    case 'scatter': return bothSides(side => dotField(scatteredDots(table, mark, side), mark.soft))
    case 'outline': {
      const points: readonly Place[] = mark.points
      const field = outlineField([draped(table, points, true)], outlineReach(mark.soft, mark.wobble))
      const map = bothSides(side => cutEdge(field, mark.soft, mark.wobble, seed, side))
      for (const i of keep.onBody) map[i] = mark.amount * (map[i] ?? 0)
      return map
    }
    case 'worm tracks': return wormMap(keep, mark)
    case 'torn sponge': return spongeMap(keep, mark)
  }
}

type Fan = Extract<Mark, { kind: 'fan' }>

/** A fan of strokes whose paint, near the root where they lie over each other, is spread as a hand would. */
export function fanField(root: PlanePoint, fan: Fan, length: number, hand?: number): PlaneField {
  const strokes = strokeField(fanStrokes(root, fan, length), 'airbrush', hand)
  const gap = Math.abs(fan.angle[1] - fan.angle[0]) * Math.PI / 180 / (fan.count - 1)
  const breadth = Math.sqrt(2 * Math.PI) * length / 100 * fan.width[0]
  const at = (U: number, V: number) => {
    const paint = strokes.at(U, V)
    if (paint <= 0) return 0
    const over = Math.min(fan.count, breadth / Math.max(1e-9, gap * Math.hypot(U - root[0], V - root[1])))
    return over > 1 ? paint / over ** FLICK : paint
  }
  return { at, meets: 'add' }
}

/**
 * The strokes of a fan from its root, first to last: lengths and angles run from the first to the last stroke, widths and amounts
 * along each. It keeps its form: all of it grows with the body (mm at 100 mm).
 */
export function fanStrokes(root: PlanePoint, fan: Fan, length: number): PlaneStroke[] {
  const scale = length / 100
  return Array.from({ length: fan.count }, (_, k) => {
    const share = k / (fan.count - 1)
    const even = scale * (fan.length[0] + (fan.length[1] - fan.length[0]) * share)
    const reach = even * (1 - FAN_ROUND * (2 * share - 1) ** 4) * (1 + FAN_VARIES * (2 * hashShare(k, fan.count, 811) - 1))
    const angle = (fan.angle[0] + (fan.angle[1] - fan.angle[0]) * share) * Math.PI / 180
    const tip: PlanePoint = [root[0] + reach * Math.cos(angle), root[1] - reach * Math.sin(angle)]
    return { points: [root, tip], width: [scale * fan.width[0], scale * fan.width[1]], amount: fan.amount }
  })
}
