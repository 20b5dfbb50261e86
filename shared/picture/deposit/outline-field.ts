import { binAt, binned, middleU, middleV, type Bins } from './bins'
import type { PlanePoint } from './plane-place'

/** Closed outlines on the flat surface, ready to tell how far inside them a place lies. */
export interface OutlineField {
  reach: number
  bins: Bins
  /** Ends of every edge: four numbers each. */
  edges: Float64Array
  /** Which outline an edge belongs to. */
  outline: Int32Array
  /** For each entry of `bins.items`: 1 when the middle of the bin lies inside the entry's outline. */
  middleInside: Uint8Array
  /** 1 where a bin lies wholly inside an outline. */
  filled: Uint8Array
}

/** Prepares outlines; distances are right up to `reach` mm from an edge and stop there. */
export function outlineField(outlines: readonly (readonly PlanePoint[])[], reach: number): OutlineField {
  const edgeCount = outlines.reduce((sum, points) => sum + points.length, 0)
  const edges = new Float64Array(4 * edgeCount)
  const boxes = new Float64Array(4 * edgeCount)
  const outline = new Int32Array(edgeCount)
  let e = 0
  outlines.forEach((points, k) => points.forEach((a, i) => {
    const b = points[(i + 1) % points.length] ?? a
    edges.set([a[0], a[1], b[0], b[1]], 4 * e)
    boxes.set([Math.min(a[0], b[0]) - reach, Math.min(a[1], b[1]) - reach, Math.max(a[0], b[0]) + reach, Math.max(a[1], b[1]) + reach], 4 * e)
    outline[e++] = k
  }))
  const bins = binned(boxes)
  const middleInside = new Uint8Array(bins.items.length)
  const filled = new Uint8Array(bins.columns * bins.rows)
  const first = new Int32Array(outlines.length + 1)
  outlines.forEach((points, k) => {
    first[k + 1] = (first[k] ?? 0) + points.length
  })
  for (let bin = 0; bin < filled.length; bin++) {
    const U = middleU(bins, bin)
    const V = middleV(bins, bin)
    let at = bins.start[bin] ?? 0
    const end = bins.start[bin + 1] ?? 0
    for (let k = 0; k < outlines.length; k++) {
      const isIn = isInside(edges, first[k] ?? 0, first[k + 1] ?? 0, U, V)
      let touches = false
      while (at < end && outline[bins.items[at] ?? 0] === k) {
        touches = true
        middleInside[at++] = isIn ? 1 : 0
      }
      if (isIn && !touches) filled[bin] = 1
    }
  }
  return { reach, bins, edges, outline, middleInside, filled }
}

function isInside(edges: Float64Array, from: number, to: number, U: number, V: number): boolean {
  let inside = false
  for (let e = 4 * from; e < 4 * to; e += 4) {
    const ay = (edges[e + 1] ?? 0) - V
    const by = (edges[e + 3] ?? 0) - V
    if ((ay < 0) === (by < 0)) continue
    const ax = (edges[e] ?? 0) - U
    if (ax - ay * ((edges[e + 2] ?? 0) - U - ax) / (by - ay) > 0) inside = !inside
  }
  return inside
}

/** mm to the nearest outline: negative inside any of them, at most `reach` in size. */
export function outlineDistance(field: OutlineField, U: number, V: number): number {
  const { bins, edges, outline, reach } = field
  const bin = binAt(bins, U, V)
  if (bin < 0) return reach
  if (field.filled[bin]) return -reach
  const end = bins.start[bin + 1] ?? 0
  const start = bins.start[bin] ?? 0
  if (start === end) return reach
  const rU = U - middleU(bins, bin)
  const rV = V - middleV(bins, bin)
  let nearest = reach
  let own = -1
  let best = Infinity
  let inside = false
  for (let k = start; k <= end; k++) {
    const item = k < end ? bins.items[k] ?? 0 : -1
    const of = item < 0 ? -1 : outline[item] ?? 0
    if (of !== own) {
      if (own >= 0) nearest = Math.min(nearest, inside ? -Math.min(reach, Math.sqrt(best)) : Math.sqrt(best))
      if (item < 0) break
      own = of
      best = Infinity
      inside = field.middleInside[k] === 1
    }
    const ax = (edges[4 * item] ?? 0) - U
    const ay = (edges[4 * item + 1] ?? 0) - V
    const ex = (edges[4 * item + 2] ?? 0) - U - ax
    const ey = (edges[4 * item + 3] ?? 0) - V - ay
    const size = ex * ex + ey * ey
    const t = size > 0 ? Math.min(1, Math.max(0, -(ax * ex + ay * ey) / size)) : 0
    const dx = ax + t * ex
    const dy = ay + t * ey
    best = Math.min(best, dx * dx + dy * dy)
    // Does the way from the bin's middle to the place cross this edge?
    const a = rU * ay - rV * ax
    const b = a + rU * ey - rV * ex
    if ((a > 0) === (b > 0)) continue
    const placeSide = ex * ay - ey * ax
    const middleSide = placeSide + ex * rV - ey * rU
    if ((placeSide > 0) !== (middleSide > 0)) inside = !inside
  }
  return nearest
}
