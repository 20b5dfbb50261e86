/** A plain blank, nose left, 200 by 84: what stands where no blank is known yet. Our own shape. */
export const PLAIN_BLANK: readonly (readonly [number, number])[] = [
  [0, 0], [2.5, -8], [10, -18], [22, -28], [38, -36.5], [58, -41.5], [82, -43], [108, -40], [134, -33], [158, -24], [178, -15.5],
  [191, -10], [198, -5], [200, 0], [198, 4], [191, 7.5], [178, 12], [158, 20], [134, 29], [108, 36], [82, 40], [58, 39],
  [38, 34], [22, 26], [10, 16.5], [2.5, 7.5],
]

const round = (figure: number) => Math.round(figure * 100) / 100

/**
 * A closed smooth line through outline points (any unit), as SVG path data: a Catmull-Rom spline turned into cubic
 * Béziers, so the line goes through every point. Throws RangeError below three points.
 */
export function closedLine(points: readonly (readonly [number, number])[]): string {
  if (points.length < 3) throw new RangeError('An outline needs at least three points.')
  const at = (place: number) => points[(place + points.length) % points.length] as readonly [number, number]
  const start = at(0)
  const runs = points.map((_, place) => {
    const [before, from, to, after] = [at(place - 1), at(place), at(place + 1), at(place + 2)]
    const curve = [
      from[0] + (to[0] - before[0]) / 6, from[1] + (to[1] - before[1]) / 6,
      to[0] - (after[0] - from[0]) / 6, to[1] - (after[1] - from[1]) / 6,
      to[0], to[1],
    ]
    return `C${curve.map(round).join(' ')}`
  })
  return `M${round(start[0])} ${round(start[1])}${runs.join('')}Z`
}

/** The box round points, widened by a margin on every side, as an SVG viewBox. */
export function boxRound(points: readonly (readonly [number, number])[], margin: number): string {
  const [xs, ys] = [points.map(point => point[0]), points.map(point => point[1])]
  const [left, top] = [Math.min(...xs) - margin, Math.min(...ys) - margin]
  return [left, top, Math.max(...xs) + margin - left, Math.max(...ys) + margin - top].map(round).join(' ')
}
