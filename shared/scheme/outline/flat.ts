/** A place on a flat sheet, mm: x to the right, y up. */
export type FlatPoint = readonly [x: number, y: number]

/** The upright box round some places, mm. */
export interface FlatBox { left: number, low: number, right: number, high: number }

/** Area inside a closed line, mm²: above 0 when it runs against the clock. */
export function ringArea(points: readonly FlatPoint[]): number {
  let twice = 0
  points.forEach(([x, y], i) => {
    const [nextX, nextY] = points[(i + 1) % points.length] ?? [x, y]
    twice += x * nextY - nextX * y
  })
  return twice / 2
}

/** The box round every place of some lines; null where there is none. */
export function boxRound(lines: readonly (readonly FlatPoint[])[]): FlatBox | null {
  const box = { left: Infinity, low: Infinity, right: -Infinity, high: -Infinity }
  for (const line of lines) {
    for (const [x, y] of line) {
      box.left = Math.min(box.left, x)
      box.right = Math.max(box.right, x)
      box.low = Math.min(box.low, y)
      box.high = Math.max(box.high, y)
    }
  }
  return box.left <= box.right ? box : null
}

/** Whether a place lies inside a closed line. */
export function isInside(points: readonly FlatPoint[], [x, y]: FlatPoint): boolean {
  let inside = false
  points.forEach(([ax, ay], i) => {
    const [bx, by] = points[(i + 1) % points.length] ?? [ax, ay]
    if ((ay > y) !== (by > y) && x < ax + (bx - ax) * (y - ay) / (by - ay)) inside = !inside
  })
  return inside
}

/** mm from a place to the piece of line between a and b. */
export function distanceToPiece([x, y]: FlatPoint, [ax, ay]: FlatPoint, [bx, by]: FlatPoint): number {
  const [ex, ey] = [bx - ax, by - ay]
  const size = ex * ex + ey * ey
  const t = size > 0 ? Math.min(1, Math.max(0, ((x - ax) * ex + (y - ay) * ey) / size)) : 0
  return Math.hypot(x - ax - t * ex, y - ay - t * ey)
}
