import { drawnAt, flatOf, placeOfFlat } from './flat-blank'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { type DrawingPoint, svgPath } from '#shared/blank/side-outline'
import { fanStrokes } from '#shared/picture/deposit/mark-map'
import type { Mark, Place } from '#shared/scheme/mark'
import { markParts, type MarkPart, type PartKind } from '#shared/scheme/mark-parts'

/** A part as lines in a drawing of the left side, mm with y down. */
export interface PartDrawing {
  part: MarkPart
  /** The line itself, or the outline. */
  line: string
  /** As wide as it is laid; empty for shapes, which are filled by their line. */
  body: string
  /** Where its own places are seen. */
  handles: DrawingPoint[]
}

/** Pieces between two places of a line, so that it bends with the body. */
const PIECES = 6

function along(blank: PreparedBlank, points: readonly Place[], isClosed: boolean): DrawingPoint[] {
  const places = isClosed && points[0] ? [...points, points[0]] : points
  return places.flatMap((to, i): DrawingPoint[] => {
    const from = places[i - 1]
    if (!from) return [drawnAt(blank, to)]
    const count = Math.hypot(to[0] - from[0], (to[1] - from[1]) / 3) < 0.02 ? 1 : PIECES
    return Array.from({ length: count }, (_, k) => drawnAt(blank, [from[0] + (to[0] - from[0]) * (k + 1) / count, from[1] + (to[1] - from[1]) * (k + 1) / count]))
  })
}

/** A line as wide as it runs evenly over its length from its start to its end, mm to each side. */
function ribbon(points: readonly DrawingPoint[], [start, end]: readonly [number, number]): string {
  const run: number[] = []
  points.forEach(([x, y], i) => {
    const [bx, by] = points[i - 1] ?? [x, y]
    run.push((run[i - 1] ?? 0) + Math.hypot(x - bx, y - by))
  })
  const total = run.at(-1) || 1
  const side = (turn: 1 | -1) => points.map(([x, y], i): DrawingPoint => {
    const [ax, ay] = points[i - 1] ?? [x, y]
    const [bx, by] = points[i + 1] ?? [x, y]
    const size = Math.hypot(bx - ax, by - ay) || 1
    const width = start + (end - start) * (run[i] ?? 0) / total
    return [x - turn * width * (by - ay) / size, y + turn * width * (bx - ax) / size]
  })
  return svgPath([...side(1), ...side(-1).reverse()])
}

function circle([x, y]: DrawingPoint, radius: number): string {
  return svgPath(Array.from({ length: 24 }, (_, i): DrawingPoint => [x + radius * Math.cos(i * Math.PI / 12), y + radius * Math.sin(i * Math.PI / 12)]))
}

function drawPart(blank: PreparedBlank, mark: Mark, part: MarkPart): PartDrawing {
  const handles = part.points.map(place => drawnAt(blank, place))
  const [middle = [0, 0]] = handles
  if (part.kind === 'dot') return { part, handles, line: circle(middle, part.width[0]), body: '' }
  if (mark.kind === 'fan') {
    const rays = fanStrokes(flatOf(blank, mark.root), mark, blank.shape.length)
    const lines = rays.map(ray => ray.points.map(point => drawnAt(blank, placeOfFlat(blank, point))))
    return { part, handles, line: lines.map(line => svgPath(line, false)).join(''), body: rays.map((ray, i) => ribbon(lines[i] ?? [], ray.width)).join('') }
  }
  const line = along(blank, part.points, part.isClosed)
  return part.isClosed ? { part, handles, line: svgPath(line), body: '' } : { part, handles, line: svgPath(line, false), body: ribbon(line, part.width) }
}

/** Draws parts, each mark once for as long as it stands as it is. */
export function partDrawer(blank: PreparedBlank): (marks: readonly Mark[]) => PartDrawing[] {
  const kept = new WeakMap<Mark, PartDrawing[]>()
  return marks => marks.flatMap((mark, place) => {
    const drawn = kept.get(mark) ?? markParts([mark]).map(part => drawPart(blank, mark, part))
    kept.set(mark, drawn)
    return drawn.map(one => one.part.at.mark === place ? one : { ...one, part: { ...one.part, at: { ...one.part.at, mark: place } } })
  })
}

const figure = (value: number) => String(Number(value.toFixed(1)))

/** Half or the whole of what `width` says, in the words of its tool. */
export const WIDTH_WORDS: Readonly<Record<PartKind, readonly [start: string, end: string | null]>> = {
  'airbrush line': ['Wide at its start', 'Wide at its end'],
  'dagger stroke': ['Wide at its start', 'Wide at its end'],
  'brush line': ['Half as wide at its start', 'Half as wide at its end'],
  'dot': ['Radius', null],
  'fin rays': ['Wide at the root', 'Wide at the tip'],
  'filled shape': ['Soft edge', null],
}

/** A part in a few words: what it is, and where its middle lies. */
export function partWords({ kind, points, width, only }: MarkPart): string {
  const mean = (of: 0 | 1) => points.reduce((sum, place) => sum + place[of], 0) / Math.max(1, points.length)
  const where = `${Math.round(100 * mean(0))} % along, ${Math.round(100 * mean(1))} % down`
  const size = kind === 'dot' || kind === 'filled shape' || Math.abs(width[0] - width[1]) < 0.05 ? `${figure(width[0])} mm` : `${figure(width[0])} to ${figure(width[1])} mm`
  const side = only ? `, ${only} side only` : ''
  return kind === 'filled shape' ? `Filled shape, ${where}${side}` : `${kind.replace(/^./, first => first.toUpperCase())}, ${size}, ${where}${side}`
}
