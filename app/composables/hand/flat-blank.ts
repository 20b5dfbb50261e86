import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { placeInSideView, placeOnSurface } from '#shared/blank/surface-coordinates'
import type { DrawingPoint } from '#shared/blank/side-outline'
import { planePlace } from '#shared/picture/deposit/plane-place'
import type { Place } from '#shared/scheme/mark'
import type { FlatPoint } from '#shared/scheme/outline/flat'

const HALVINGS = 40
/** How far beyond a body outlines may run on: shares of the length and of the half girth. */
const ROOM = { before: -0.2, behind: 1.2, over: -0.5, under: 1.5 } as const

const within = (value: number, least: number, most: number) => Math.min(most, Math.max(least, value))
const rounded = (value: number) => Math.round(value * 1e5) / 1e5

/** A place held where places may be, to a hundred-thousandth of a share (a thousandth of a mm). */
export function heldPlace([u, v]: Place): Place {
  return [rounded(within(u, ROOM.before, ROOM.behind)), rounded(within(v, ROOM.over, ROOM.under))]
}

/** A place of a blank laid out flat, mm: along from mid-length toward the tail, up from the widest line toward the back. */
export function flatOf({ table }: PreparedBlank, [u, v]: Place): FlatPoint {
  return planePlace(table, u, v)
}

/** The place of a blank that lies there when laid out flat. Beyond nose, tail and ridges it goes on straight, as far as places go. */
export function placeOfFlat({ table }: PreparedBlank, [along, up]: FlatPoint): Place {
  const shareAcross = (u: number) => {
    const ridge = up >= 0 ? planePlace(table, u, 0)[1] : -planePlace(table, u, 1)[1]
    return within(0.5 - 0.5 * up / Math.max(1e-6, ridge), ROOM.over, ROOM.under)
  }
  let [low, high] = [ROOM.before, ROOM.behind] as [number, number]
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2
    if (planePlace(table, middle, shareAcross(middle))[0] < along) low = middle
    else high = middle
  }
  const u = (low + high) / 2
  return heldPlace([u, shareAcross(u)])
}

/** A place moved over the skin, mm toward the tail and toward the back. */
export function movedPlace(blank: PreparedBlank, place: Place, along: number, up: number): Place {
  const [x, y] = flatOf(blank, place)
  return placeOfFlat(blank, [x + along, y + up])
}

/** The place under a pointer in a drawing of the left side, mm with y down. */
export function placeUnder(blank: PreparedBlank, [x, y]: DrawingPoint): Place {
  const { u, v } = placeInSideView(blank, x, -y, 1)
  return heldPlace([u, v])
}

/** Where a place is seen in a drawing of the left side, mm with y down; what lies beyond the body is seen at its edge. */
export function drawnAt(blank: PreparedBlank, [u, v]: Place): DrawingPoint {
  const { position } = placeOnSurface(blank, within(u, 0, 1), within(v, 0, 1), 1)
  return [position[0], -position[1]]
}
