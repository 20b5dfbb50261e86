import { flatOf, heldPlace, placeOfFlat } from './flat-blank'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { gillEdge } from '#shared/blank/zones'
import { placeInSideView } from '#shared/blank/surface-coordinates'
import type { Mark, OnlySide, Place } from '#shared/scheme/mark'
import { layDot, layMark, layStrokes, type LaidMark } from '#shared/scheme/mark-lay'
import { pressedEnds, strokeAlong, TRACE_TOLERANCE, tracedLine, type TracePoint } from '#shared/scheme/outline/trace'

/** What the hand holds: something that draws, or nothing, to take hold of what is drawn. */
export const HAND_TOOLS = ['airbrush line', 'dagger stroke', 'brush line', 'dot', 'fin rays', 'filled shape'] as const
export type HandTool = typeof HAND_TOOLS[number]

/** How a tool is set. */
export interface HandSettings {
  /** mm: a gun's bell (σ), half a brush's line, a dot's radius. */
  width: number
  /** Softness of the edge of dots and shapes, mm. */
  soft: number
  /** Rays of a fan, and the angle they spread over, degrees. */
  rays: number
  spread: number
  /** The one flank it is drawn on; both when there is none. */
  only?: OnlySide
}

export const USUAL_SETTINGS: Readonly<Record<HandTool, HandSettings>> = {
  'airbrush line': { width: 1.2, soft: 0.1, rays: 7, spread: 50 },
  'dagger stroke': { width: 1.8, soft: 0.1, rays: 7, spread: 50 },
  'brush line': { width: 0.4, soft: 0.1, rays: 7, spread: 50 },
  'dot': { width: 0.9, soft: 0.1, rays: 7, spread: 50 },
  'fin rays': { width: 0.35, soft: 0.1, rays: 7, spread: 50 },
  'filled shape': { width: 1, soft: 0.4, rays: 7, spread: 50 },
}

/** A dagger runs out to this share of its width, and lays less there. */
const DAGGER = { thin: 0.15, amount: [1, 0.7] } as const
const RAY_AMOUNT = [1, 0.5] as const
const NOWHERE = 'That line went nowhere. Press and draw, or lay it by its figures.'

/** What came of a line of the hand; `said` when something about it should be known. */
export type Drawn = LaidMark & { said?: string }

/** Draws with a tool along a trace. What cannot be drawn is refused with a sentence, and what is there stays. */
export function draw(blank: PreparedBlank, marks: readonly Mark[], tool: HandTool, settings: HandSettings, trace: readonly TracePoint[]): Drawn {
  const [first] = trace
  const last = trace.at(-1)
  if (!first || !last) return { ok: false, because: NOWHERE }
  if (tool === 'dot') return layDot(marks, [...first.place, pressedEnds([first], settings.width)[0]], settings.soft, settings.only)
  if (tool === 'fin rays') return drawFan(blank, marks, settings, first, last)
  const line = tracedLine(trace, tool === 'filled shape')
  if (!line) return { ok: false, because: NOWHERE }
  const said = line.tolerance > TRACE_TOLERANCE ? { said: `A long line: it is kept within ${line.tolerance} mm of your hand.` } : {}
  const [start, end] = pressedEnds(trace, settings.width)
  switch (tool) {
    case 'airbrush line': return { ...layStrokes(marks, 'airbrush', [strokeAlong(line.points, [start, end])], settings.only), ...said }
    case 'dagger stroke': return { ...layStrokes(marks, 'airbrush', [strokeAlong(line.points, [start, Math.max(0.05, end * DAGGER.thin)], DAGGER.amount)], settings.only), ...said }
    case 'brush line': return { ...layStrokes(marks, 'brush', [strokeAlong(line.points, [start, end])], settings.only), ...said }
    case 'filled shape': return { ...layMark(marks, { kind: 'outline', points: line.points, soft: settings.soft, wobble: 0, amount: 1, ...sided(settings.only) }), ...said }
  }
}

const sided = (only: OnlySide) => only ? { only } : {}

/** A fan from where the hand began toward where it ended; lengths and widths are kept at a body of 100 mm. */
function drawFan(blank: PreparedBlank, marks: readonly Mark[], { width, rays, spread, only }: HandSettings, first: TracePoint, last: TracePoint): Drawn {
  const [dx, dy] = [last.flat[0] - first.flat[0], last.flat[1] - first.flat[1]]
  const reach = Math.hypot(dx, dy)
  if (reach < 1) return { ok: false, because: 'Fin rays start at their root: press there, and draw out to the tip of the middle one.' }
  const scale = 100 / blank.shape.length
  const toTenth = (value: number) => Math.round(value * 10) / 10
  const middle = Math.atan2(-dy, dx) * 180 / Math.PI
  const at100 = [width * scale, width * scale * 0.5].map(each => Math.max(0.02, Math.round(each * 1000) / 1000)) as [number, number] // two
  return layMark(marks, {
    kind: 'fan', root: first.place, count: rays, length: [toTenth(reach * scale), toTenth(reach * scale)],
    angle: [toTenth(middle - spread / 2), toTenth(middle + spread / 2)], width: at100, amount: [...RAY_AMOUNT], ...sided(only),
  })
}

/** Marks that find their own place on a blank. */
export const READY_MARKS = ['gill mark', 'iris', 'pupil', 'rim of the eye'] as const
export type ReadyMark = typeof READY_MARKS[number]

/** The pupil and the rim, as shares of the eye's radius (common practice). */
const EYE = { pupil: 0.5, rim: 0.09, ring: 1.0, places: 28 } as const

/** Lays a mark where the blank says it belongs: behind the gill cover, or at the eye. An eye takes one coat for each of its colours. */
export function layReady(blank: PreparedBlank, marks: readonly Mark[], what: ReadyMark, only?: OnlySide): LaidMark {
  const { shape } = blank
  if (what === 'gill mark') {
    const { top, bottom } = shape.gill
    const points = Array.from({ length: 9 }, (_, i): Place => {
      const v = top + (bottom - top) * i / 8
      return heldPlace([gillEdge(shape.gill, v), v])
    })
    return layStrokes(marks, 'airbrush', [strokeAlong(points, [shape.length * 0.012, shape.length * 0.005], [1, 0.8])], only)
  }
  const { x, y, radius } = shape.eye
  const { u, v } = placeInSideView(blank, x, y, 1)
  const middle = heldPlace([u, v])
  switch (what) {
    case 'iris': return layDot(marks, [...middle, radius], 0.05, only)
    case 'pupil': return layDot(marks, [...middle, radius * EYE.pupil], 0.05, only)
    case 'rim of the eye': {
      const [along, up] = flatOf(blank, middle)
      const ring = Array.from({ length: EYE.places + 1 }, (_, i): Place => {
        const angle = 2 * Math.PI * i / EYE.places
        return placeOfFlat(blank, [along + radius * EYE.ring * Math.cos(angle), up + radius * EYE.ring * Math.sin(angle)])
      })
      const width = Math.max(0.05, radius * EYE.rim)
      return layStrokes(marks, 'brush', [strokeAlong(ring, [width, width])], only)
    }
  }
}

/** A trace between two typed places: straight in shares; for a shape, the oval between them. */
export function typedTrace(blank: PreparedBlank, tool: HandTool, from: Place, to: Place): TracePoint[] {
  const places = tool === 'filled shape'
    ? Array.from({ length: 24 }, (_, i): Place => {
        const angle = 2 * Math.PI * i / 24
        return [(from[0] + to[0]) / 2 + (to[0] - from[0]) / 2 * Math.cos(angle), (from[1] + to[1]) / 2 + (to[1] - from[1]) / 2 * Math.sin(angle)]
      })
    : [from, to]
  return places.map(heldPlace).map(place => ({ place, flat: flatOf(blank, place), pressure: 0.5 }))
}
