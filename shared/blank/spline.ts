/** How a spline ends: `odd` has no curvature there (it passes straight through), `even` has no slope. */
export type SplineEnd = 'odd' | 'even'

/** A cubic spline with continuous curvature: four coefficients a gap, for the distance from the gap's left knot. */
export interface Spline {
  knots: readonly number[]
  coefficients: Float64Array
}

/**
 * Cubic spline with continuous first and second derivative through (knots, values).
 * @param knots rising, at least 2
 * @throws RangeError when knots and values do not match or do not rise
 */
export function cubicSpline(knots: readonly number[], values: readonly number[], start: SplineEnd, end: SplineEnd): Spline {
  const n = knots.length
  if (n < 2 || values.length !== n) throw new RangeError('a spline needs as many values as knots, at least two')
  const at = (list: readonly number[] | Float64Array, i: number) => list[i] ?? Number.NaN
  const gap = (i: number) => at(knots, i + 1) - at(knots, i)
  const slope = (i: number) => (at(values, i + 1) - at(values, i)) / gap(i)
  for (let i = 0; i + 1 < n; i++) if (!(gap(i) > 0)) throw new RangeError('the knots of a spline rise')
  // Tridiagonal system for the second derivatives, solved forward and back.
  const upper = new Float64Array(n)
  const right = new Float64Array(n)
  for (let i = 0; i < n; i++) {
    let low = i > 0 ? gap(i - 1) : 0
    let high = i + 1 < n ? gap(i) : 0
    let middle = 2 * (low + high)
    let value = 6 * ((i + 1 < n ? slope(i) : 0) - (i > 0 ? slope(i - 1) : 0))
    if ((i === 0 && start === 'odd') || (i === n - 1 && end === 'odd')) [low, middle, high, value] = [0, 1, 0, 0]
    const pivot = middle - (i > 0 ? low * at(upper, i - 1) : 0)
    upper[i] = high / pivot
    right[i] = (value - (i > 0 ? low * at(right, i - 1) : 0)) / pivot
  }
  const second = new Float64Array(n)
  for (let i = n - 1; i >= 0; i--) second[i] = at(right, i) - (i + 1 < n ? at(upper, i) * at(second, i + 1) : 0)
  const coefficients = new Float64Array(4 * (n - 1))
  for (let i = 0; i + 1 < n; i++) {
    const [a, b] = [at(second, i), at(second, i + 1)]
    coefficients.set([at(values, i), slope(i) - gap(i) * (2 * a + b) / 6, a / 2, (b - a) / (6 * gap(i))], 4 * i)
  }
  return { knots, coefficients }
}

/** The gap of a rising list that t falls into; the outer gaps reach beyond the ends. */
export function gapOf(knots: readonly number[], t: number): number {
  let low = 0
  let high = knots.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((knots[middle] ?? 0) <= t) low = middle
    else high = middle
  }
  return low
}

/** Value of a spline at distance `d` into gap `i`. */
export function splineValue(spline: Spline, i: number, d: number): number {
  const c = spline.coefficients
  const k = 4 * i
  return (c[k] ?? 0) + d * ((c[k + 1] ?? 0) + d * ((c[k + 2] ?? 0) + d * (c[k + 3] ?? 0)))
}

/** Slope of a spline at distance `d` into gap `i`. */
export function splineSlope(spline: Spline, i: number, d: number): number {
  const c = spline.coefficients
  const k = 4 * i
  return (c[k + 1] ?? 0) + d * (2 * (c[k + 2] ?? 0) + d * 3 * (c[k + 3] ?? 0))
}
