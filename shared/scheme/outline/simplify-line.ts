import { distanceToPiece, type FlatPoint } from './flat'

/**
 * Which places of a line may stay so that every place left out lies within `tolerance` mm of the line that is kept
 * (Douglas and Peucker, The Canadian Cartographer 10, 1973). The first and the last always stay.
 *
 * @param tolerance mm, 0 or more
 * @returns rising places in `points`
 */
export function simplifyLine(points: readonly FlatPoint[], tolerance: number): number[] {
  if (points.length < 3) return points.map((_, i) => i)
  const isKept = new Uint8Array(points.length)
  isKept[0] = isKept[points.length - 1] = 1
  const spans: [number, number][] = [[0, points.length - 1]]
  for (let span = spans.pop(); span; span = spans.pop()) {
    const [from, to] = span
    const [a, b] = [points[from], points[to]]
    if (!a || !b) continue
    let [most, at] = [tolerance, -1]
    for (let i = from + 1; i < to; i++) {
      const point = points[i]
      const far = point ? distanceToPiece(point, a, b) : 0
      if (far > most) [most, at] = [far, i]
    }
    if (at < 0) continue
    isKept[at] = 1
    spans.push([from, at], [at, to])
  }
  return points.flatMap((_, i) => isKept[i] ? [i] : [])
}

/** The same for a closed line: opened at its first place and at the place farthest from it, which both stay. */
export function simplifyRing(points: readonly FlatPoint[], tolerance: number): number[] {
  const [first] = points
  if (!first || points.length < 4) return points.map((_, i) => i)
  const far = points.reduce((best, [x, y], i) => {
    const there = Math.hypot(x - first[0], y - first[1])
    return there > best.there ? { i, there } : best
  }, { i: 0, there: 0 }).i
  const out = simplifyLine(points.slice(0, far + 1), tolerance)
  const back = simplifyLine([...points.slice(far), first], tolerance).map(i => i + far)
  return [...out, ...back.slice(1, -1)]
}

/** A line as it is kept, and how far it may lie from what was drawn. */
export interface Simplified { kept: number[], /** mm */ tolerance: number }

/** Simplifies to no more than `most` places: within the tolerance asked for where that is enough, else doubled until it is. */
export function simplifyTo(points: readonly FlatPoint[], tolerance: number, most: number, isRing = false): Simplified {
  const simplify = isRing ? simplifyRing : simplifyLine
  let within = tolerance
  let kept = simplify(points, within)
  while (kept.length > most) {
    within *= 2
    kept = simplify(points, within)
  }
  return { kept, tolerance: within }
}
