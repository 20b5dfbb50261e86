import { flatOf } from '~/composables/hand/flat-blank'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { placeInSideView } from '#shared/blank/surface-coordinates'
import { gillEdge } from '#shared/blank/zones'
import { draped } from '#shared/picture/deposit/plane-place'
import type { Place } from '#shared/scheme/mark'
import type { FlatPoint } from '#shared/scheme/outline/flat'

/** One flank of a blank laid out flat with the outlines to cut, mm, y up. */
export interface FlatDrawing {
  /** Closed: the skin from ridge to ridge, to lay the sheet by. */
  skin: FlatPoint[]
  /** Open lines to lay it by: the widest line and the edge of the gill cover. */
  guides: FlatPoint[][]
  eye: { middle: FlatPoint, radius: number }
  /** Closed: what is cut. */
  cuts: FlatPoint[][]
}

const STEPS = 120
const along = (v: number, from: number, to: number) => Array.from({ length: STEPS + 1 }, (_, i): Place => [from + (to - from) * i / STEPS, v])

/** The left flank of a blank laid out flat, with a stencil's outlines as they lie on it: true on the skin along the widest line and round the girth. */
export function flatDrawing(blank: PreparedBlank, outlines: readonly (readonly Place[])[]): FlatDrawing {
  const { gill, eye } = blank.shape
  const at = placeInSideView(blank, eye.x, eye.y, 1)
  const gillLine = Array.from({ length: 25 }, (_, i): Place => {
    const v = gill.top + (gill.bottom - gill.top) * i / 24
    return [gillEdge(gill, v), v]
  })
  const flat = (places: readonly Place[]) => places.map(place => flatOf(blank, place))
  return {
    skin: flat([...along(0, 0, 1), ...along(1, 1, 0)]),
    guides: [flat(along(0.5, 0, 1)), flat(gillLine)],
    eye: { middle: flatOf(blank, [at.u, at.v]), radius: eye.radius },
    cuts: outlines.map(outline => draped(blank.table, outline, true)),
  }
}
