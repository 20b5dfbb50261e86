import type { PreparedBlank } from './prepared-blank'
import { newSection } from './profile'
import { ringRadius } from './ring'
import { viewTurn, type NoseToward, type View } from './view'

/** What a picture should show. */
export interface ViewWish {
  width: number
  height: number
  /** Degrees about the long axis: 0 left flank, 90 back, 180 right flank, 270 belly. */
  roll?: number
  nose?: NoseToward
  /** Empty border, share of the smaller picture side. */
  margin?: number
  /** Pixels per mm; the largest that fits when absent. */
  scale?: number
}

/** The box of a blank with fins, lip and wire, in the side view, mm. */
export interface SideBox {
  left: number
  right: number
  low: number
  high: number
}

/** The box around everything a blank shows from the side. */
export function sideBox(blank: PreparedBlank): SideBox {
  const { shape, profile, fins } = blank
  const box: SideBox = { left: 0, right: shape.length, low: Infinity, high: -Infinity }
  const take = (x: number, y: number, around = 0) => {
    box.left = Math.min(box.left, x - around)
    box.right = Math.max(box.right, x + around)
    box.low = Math.min(box.low, y - around)
    box.high = Math.max(box.high, y + around)
  }
  const section = newSection()
  for (let i = 0; i <= 100; i++) {
    profile.section(i / 100, section)
    take(section.x, section.c + section.h)
    take(section.x, section.c - section.h)
  }
  fins.forEach((fin) => {
    take(fin.left, fin.low)
    take(fin.right, fin.high)
  })
  const radius = ringRadius(shape.length)
  for (const ring of [shape.tie, ...shape.hangers]) {
    const angle = ring.angle * Math.PI / 180
    take(ring.x + radius * Math.cos(angle), ring.y + radius * Math.sin(angle), 1.2 * radius)
  }
  if (shape.lip) {
    const angle = shape.lip.angle * Math.PI / 180
    take(shape.lip.x - shape.lip.length * Math.cos(angle), shape.lip.y - shape.lip.length * Math.sin(angle), shape.lip.thickness)
  }
  return box
}

/** A view that shows the whole blank in the middle of the picture, as large as fits with the flank toward the viewer. */
export function fitView(blank: PreparedBlank, wish: ViewWish): View {
  const { width, height } = wish
  const roll = wish.roll ?? 0
  const nose = wish.nose ?? 'left'
  const box = sideBox(blank)
  const { cos, sin, way } = viewTurn({ roll, nose })
  const half = Math.max(blank.measures.width, blank.shape.lip?.width ?? 0) / 2
  const ends = [box.low * cos, box.high * cos]
  const low = Math.min(...ends) - Math.abs(sin) * half
  const high = Math.max(...ends) + Math.abs(sin) * half
  const border = 2 * (wish.margin ?? 0.06) * Math.min(width, height)
  // The same at every roll, so that a blank does not grow and shrink while it is turned.
  const tall = Math.max(box.high - box.low, 2 * half)
  const scale = wish.scale ?? Math.max(1e-3, Math.min((width - border) / (box.right - box.left), (height - border) / tall))
  const middle = (box.left + box.right) / 2 - blank.shape.length / 2
  return {
    roll, nose, width, height, scale,
    centreX: width / 2 - scale * way * middle,
    centreY: height / 2 + scale * way * (low + high) / 2,
  }
}
