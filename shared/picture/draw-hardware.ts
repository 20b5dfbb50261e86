import type { DrawnLip, DrawnParts, DrawnPin, DrawnRing, PicturePoint } from '#shared/blank/drawn-parts'
import { layOver, layUnder, type Canvas } from './canvas'

type Put = typeof layOver

/** Bright wire against the light of a white surface, and the one highlight it carries. Chosen by eye. */
const STEEL = { dark: 0.045, body: 0.36, shine: 0.85, narrow: 0.055 }
/** A clear plate darkens what lies behind it; its cut edges collect light. */
const PLATE = { behind: 0.75, haze: 0.035, edge: 0.42, sheen: 0.08 }

/** Draws what hides behind the body: the lip, and rings on the far side. */
export function drawBehind(canvas: Canvas, parts: DrawnParts): void {
  for (const ring of parts.rings) if (ring.isBehind) drawRing(canvas, ring, layUnder)
  if (parts.lip) drawLip(canvas, parts.lip)
}

/** Draws what stands in front: pins in the joints, rings for line and hooks. */
export function drawInFront(canvas: Canvas, parts: DrawnParts): void {
  for (const pin of parts.pins) drawPin(canvas, pin)
  for (const ring of parts.rings) if (!ring.isBehind) drawRing(canvas, ring, layOver)
}

/** Light of a wire across its width: `across` -1 below to 1 above, in the picture. */
function wireLight(across: number, up: number): number {
  const facing = Math.sqrt(Math.max(0, 1 - across * across))
  const height = across * up
  const shine = Math.exp(-((height - 0.42) ** 2) / STEEL.narrow)
  return (STEEL.dark + STEEL.body * facing * (0.55 + 0.45 * height) + STEEL.shine * shine * facing * 0.6) * (0.35 + 0.65 * facing)
}

function forBox(canvas: Canvas, from: PicturePoint, to: PicturePoint, around: number, visit: (x: number, y: number, pixel: number) => void): void {
  const left = Math.max(0, Math.floor(Math.min(from[0], to[0]) - around)), right = Math.min(canvas.width - 1, Math.ceil(Math.max(from[0], to[0]) + around))
  const top = Math.max(0, Math.floor(Math.min(from[1], to[1]) - around)), bottom = Math.min(canvas.height - 1, Math.ceil(Math.max(from[1], to[1]) + around))
  for (let row = top; row <= bottom; row++) {
    for (let column = left; column <= right; column++) visit(column + 0.5, row + 0.5, row * canvas.width + column)
  }
}

function drawRing(canvas: Canvas, ring: DrawnRing, put: Put): void {
  const { centre: [cx, cy], halfAxes: [long, short], angle, wire, stem } = ring
  drawRod(canvas, stem[0], stem[1], wire, put)
  const cos = Math.cos(angle), sin = Math.sin(angle)
  const reach = Math.max(long, short) + wire + 1
  forBox(canvas, [cx, cy], [cx, cy], reach, (x, y, pixel) => {
    const a = (x - cx) * cos + (y - cy) * sin, b = -(x - cx) * sin + (y - cy) * cos
    const { off, nx, ny } = fromEllipse(a, b, long, Math.max(short, 0.01))
    const share = Math.min(1, Math.max(0, wire - Math.abs(off) + 0.5))
    if (share <= 0) return
    // Outward across the wire, turned back into the picture, where down is +y.
    const up = -(nx * sin + ny * cos)
    const light = share * wireLight(Math.min(1, Math.max(-1, off / wire)), up)
    put(canvas, pixel, share, light, light, light)
  })
}

/** Distance from an ellipse, + outside, and the outward direction there; first order, good near the line. */
function fromEllipse(a: number, b: number, long: number, short: number): { off: number, nx: number, ny: number } {
  const value = Math.hypot(a / long, b / short)
  const gx = a / (long * long), gy = b / (short * short)
  const slope = Math.hypot(gx, gy)
  if (slope === 0) return { off: -Math.min(long, short), nx: 0, ny: 1 }
  return { off: (value - 1) * value / slope, nx: gx / slope, ny: gy / slope }
}

function drawPin(canvas: Canvas, { ends, half }: DrawnPin): void {
  drawRod(canvas, ends[0], ends[1], half, layOver)
}

function drawRod(canvas: Canvas, from: PicturePoint, to: PicturePoint, half: number, put: Put): void {
  const dx = to[0] - from[0], dy = to[1] - from[1]
  const length2 = dx * dx + dy * dy
  if (length2 === 0) return
  const length = Math.sqrt(length2)
  forBox(canvas, from, to, half + 1, (x, y, pixel) => {
    const along = Math.min(1, Math.max(0, ((x - from[0]) * dx + (y - from[1]) * dy) / length2))
    const offX = x - from[0] - along * dx, offY = y - from[1] - along * dy
    const share = Math.min(1, Math.max(0, half - Math.hypot(offX, offY) + 0.5))
    if (share <= 0) return
    const across = (offX * -dy + offY * dx) / length / half
    const light = share * wireLight(Math.min(1, Math.max(-1, across)), -dx / length)
    put(canvas, pixel, share, light, light, light)
  })
}

function drawLip(canvas: Canvas, { corners, edge, flatness, facing }: DrawnLip): void {
  const [a, b, c, d] = corners
  const turned = (b[0] - a[0]) * (d[1] - a[1]) - (b[1] - a[1]) * (d[0] - a[0]) < 0
  const ring = turned ? [a, d, c, b] : [a, b, c, d]
  const left = Math.min(...ring.map(p => p[0])), right = Math.max(...ring.map(p => p[0]))
  const top = Math.min(...ring.map(p => p[1])), bottom = Math.max(...ring.map(p => p[1]))
  // A plate that faces the lamp shows a breath of it.
  const sheen = PLATE.sheen * flatness * Math.max(0, facing[1])
  forBox(canvas, [left, top], [right, bottom], 1, (x, y, pixel) => {
    const inside = insideOf(ring, x, y)
    const share = Math.min(1, Math.max(0, inside + 0.5))
    if (share <= 0) return
    const rim = Math.exp(-((inside / Math.max(0.8, edge)) ** 2))
    const hidden = 1 - PLATE.behind + 0.45 * rim
    const light = share * (PLATE.haze + sheen + PLATE.edge * rim)
    layUnder(canvas, pixel, share * hidden, light, light, light)
  })
}

/** Distance to the nearest side of a convex outline, + inside. */
function insideOf(ring: readonly PicturePoint[], x: number, y: number): number {
  let least = Infinity
  ring.forEach((from, i) => {
    const to = ring[(i + 1) % ring.length]!
    const length = Math.hypot(to[0] - from[0], to[1] - from[1])
    if (length > 0) least = Math.min(least, ((to[0] - from[0]) * (y - from[1]) - (to[1] - from[1]) * (x - from[0])) / length)
  })
  return least
}
