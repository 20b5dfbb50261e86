import type { DrawnLip, DrawnParts, DrawnRing, PicturePoint } from '#shared/blank/drawn-parts'
import { layOver, layOverFins, layUnder, type Canvas } from './canvas'

type Put = typeof layOver

/** Bright wire against the light of a white surface, and the one highlight it carries. Chosen by eye. */
const STEEL = { dark: 0.045, body: 0.36, shine: 0.85, narrow: 0.055 }
/** A clear plate darkens what lies behind it; its cut edges collect light. */
const PLATE = { behind: 0.7, haze: 0.055, edge: 0.62, shade: 0.16, sheen: 0.16, round: 0.07, across: 0.075, inner: 0.35 }
/** Wire is drawn stouter than it is, or it would vanish beside the body. */
const STOUT = 1.7

/** Draws the lip, the rings and the pins of joints. What the body hides of them stays hidden; rings stand before fins. */
export function drawHardware(canvas: Canvas, { lip, rings, pins }: DrawnParts): void {
  if (lip) drawLip(canvas, lip)
  for (const pin of pins) drawRod(canvas, pin.ends[0], pin.ends[1], pin.half, layOver)
  for (const ring of rings) drawRing(canvas, ring, ring.isInFront ? layOver : layOverFins)
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

function drawRing(canvas: Canvas, { centre: [cx, cy], halfAxes: [wide, tall], wire: thin, stem }: DrawnRing, put: Put): void {
  const wire = STOUT * thin
  drawRod(canvas, stem[0], stem[1], wire, put)
  forBox(canvas, [cx, cy], [cx, cy], Math.max(wide, tall) + wire + 1, (x, y, pixel) => {
    const { off, ny } = fromEllipse(x - cx, y - cy, wide, Math.max(tall, 0.01))
    const share = Math.min(1, Math.max(0, wire - Math.abs(off) + 0.5))
    if (share <= 0) return
    // Down is + in the picture.
    const light = share * wireLight(Math.min(1, Math.max(-1, off / wire)), -ny)
    put(canvas, pixel, share, light, light, light)
  })
}

/** Distance from an ellipse, + outside, and how far down the outward direction points there; first order, good near the line. */
function fromEllipse(x: number, y: number, wide: number, tall: number): { off: number, ny: number } {
  const value = Math.hypot(x / wide, y / tall)
  const gx = x / (wide * wide), gy = y / (tall * tall)
  const slope = Math.hypot(gx, gy)
  if (slope === 0) return { off: -Math.min(wide, tall), ny: 1 }
  return { off: (value - 1) * value / slope, ny: gy / slope }
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

function drawLip(canvas: Canvas, { corners, edge, flatness, facing, isInFront }: DrawnLip): void {
  const put = isInFront ? layOver : layUnder
  const [a, b, c, d] = corners
  const turned = (b[0] - a[0]) * (d[1] - a[1]) - (b[1] - a[1]) * (d[0] - a[0]) < 0
  const ring = turned ? [a, d, c, b] : [a, b, c, d]
  const left = Math.min(...ring.map(p => p[0])), right = Math.max(...ring.map(p => p[0]))
  const top = Math.min(...ring.map(p => p[1])), bottom = Math.max(...ring.map(p => p[1]))
  // A plate that faces the lamp shows a breath of it.
  const sheen = PLATE.sheen * flatness * (0.6 + 0.4 * Math.abs(facing[1]))
  const narrow = Math.min(...ring.map((from, i) => Math.hypot(ring[(i + 1) % 4]![0] - from[0], ring[(i + 1) % 4]![1] - from[1])))
  forBox(canvas, [left, top], [right, bottom], 1, (x, y, pixel) => {
    const inside = insideOf(ring, x, y, PLATE.round * narrow)
    const share = Math.min(1, Math.max(0, inside + 0.5))
    if (share <= 0) return
    const wide = Math.max(0.9, (0.4 + 0.5 * flatness) * edge)
    const rim = Math.exp(-((inside / wide) ** 2))
    const up = upwardOf(ring, x, y)
    // Just inside an edge the plate shows what lies beside it, darker; across it the tent's cloth runs from floor to sky.
    const inner = PLATE.inner * Math.exp(-(((inside - 2.2 * wide) / (1.3 * wide)) ** 2)) * (1 - flatness)
    const cloth = PLATE.haze + sheen + PLATE.across * (0.5 + 0.5 * up) * Math.min(1, inside / (4 * wide))
    const hidden = Math.min(1, 1 - PLATE.behind + 0.5 * rim + 0.4 * inner)
    const light = share * (cloth * (1 - inner) + rim * (PLATE.shade + (PLATE.edge - PLATE.shade) * (0.5 + 0.5 * up) ** 2))
    put(canvas, pixel, share * hidden, light, light, light)
  })
}

/** How far up the nearest side of a convex outline looks, -1 down to 1 up; sides change over softly toward the middle. */
function upwardOf(ring: readonly PicturePoint[], x: number, y: number): number {
  let [sum, weight] = [0, 0]
  ring.forEach((from, i) => {
    const to = ring[(i + 1) % ring.length]!
    const length = Math.max(1e-6, Math.hypot(to[0] - from[0], to[1] - from[1]))
    const side = Math.max(0.5, ((to[0] - from[0]) * (y - from[1]) - (to[1] - from[1]) * (x - from[0])) / length)
    // Outward of a side that runs clockwise, down being +.
    const share = 1 / (side * side)
    sum += share * (to[0] - from[0]) / length
    weight += share
  })
  return sum / weight
}

/** Distance to the sides of a convex outline, + inside; `round` pixels soften its corners. */
function insideOf(ring: readonly PicturePoint[], x: number, y: number, round: number): number {
  let least = Infinity, sum = 0
  const sides = ring.map((from, i) => {
    const to = ring[(i + 1) % ring.length]!
    const length = Math.max(1e-6, Math.hypot(to[0] - from[0], to[1] - from[1]))
    const side = ((to[0] - from[0]) * (y - from[1]) - (to[1] - from[1]) * (x - from[0])) / length
    least = Math.min(least, side)
    return side
  })
  if (round < 0.3) return least
  for (const side of sides) sum += Math.exp((least - side) / round)
  return least - round * Math.log(sum)
}
