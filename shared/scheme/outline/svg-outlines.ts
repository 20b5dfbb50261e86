import { type FlatPoint, isInside, ringArea } from './flat'
import { moved, readTransform, type SvgMatrix, within } from './svg-matrix'
import { readPathData, type PathLine } from './svg-path'
import { refuseNodes, SvgRefusal, SVG_LIMITS, type SvgNode } from './svg-refusal'
import { shapePath } from './svg-shapes'
import { sheetMatrix } from './svg-sheet'

/** How far a curve may lie from the straight pieces that stand for it, mm. */
const FLATTEN = 0.02
/** Smaller than this nobody cuts, mm². */
const LEAST_AREA = 0.05
/** Elements that hold no outlines of their own: what is defined, described or edited with. */
const NOT_DRAWN: ReadonlySet<string> = new Set(['defs', 'clipPath', 'mask', 'marker', 'pattern', 'symbol', 'linearGradient', 'radialGradient', 'filter', 'style', 'title', 'desc', 'metadata', 'namedview', 'switch'])

/** The outlines of a drawing on a flat sheet, mm, y up, about the middle of its sheet. */
export interface SvgOutlines {
  outlines: FlatPoint[][]
  /** Lines that enclose next to nothing: left out. */
  tooSmall: number
  /** Outlines that lie inside another: as cut, they fall out with it. */
  islands: number
}

/**
 * Reads the outlines of a drawing: paths, polygons, rectangles, circles and ellipses under their transforms. Every line is closed, as a knife closes it.
 * @throws {SvgRefusal} for what is refused, cannot be read, or holds no outline
 */
export function svgOutlines(root: SvgNode): SvgOutlines {
  refuseNodes(root)
  const found: FlatPoint[][] = []
  let points = 0
  const visit = (node: SvgNode, outer: SvgMatrix) => {
    if (NOT_DRAWN.has(node.name) || isHidden(node)) return
    const matrix = within(outer, readTransform(node.attributes.transform))
    const data = shapePath(node)
    if (data !== null) {
      for (const line of readPathData(data)) {
        const ring = flattened(line, matrix)
        points += ring.length
        if (points > SVG_LIMITS.points) throw new SvgRefusal('Its outlines have too many places. Simplify its paths first.')
        found.push(ring)
      }
    }
    node.children.forEach(child => visit(child, matrix))
  }
  visit(root, sheetMatrix(root.attributes))
  const outlines = found.filter(ring => ring.length >= 3 && Math.abs(ringArea(ring)) >= LEAST_AREA)
  if (outlines.length === 0) throw new SvgRefusal('There is no closed outline in it that could be cut.')
  return { outlines, tooSmall: found.length - outlines.length, islands: outlines.filter((ring, i) => outlines.some((other, k) => k !== i && liesIn(ring, other))).length }
}

function isHidden({ attributes }: SvgNode): boolean {
  return attributes.display === 'none' || attributes.visibility === 'hidden' || /(?:^|;)\s*display\s*:\s*none/.test(attributes.style ?? '')
}

function liesIn(ring: readonly FlatPoint[], other: readonly FlatPoint[]): boolean {
  return Math.abs(ringArea(ring)) < Math.abs(ringArea(other)) && ring.every(point => isInside(other, point))
}

/** A path's line as straight pieces no farther than the tolerance from its curves. */
function flattened({ start, pieces }: PathLine, matrix: SvgMatrix): FlatPoint[] {
  let from = moved(matrix, start)
  const ring: FlatPoint[] = [from]
  for (const piece of pieces) {
    const [a, b, c] = piece.map(point => moved(matrix, point))
    if (a && b && c) {
      // Wang's bound on how far a cubic lies from its chords, 1984.
      const bend = Math.max(Math.hypot(from[0] - 2 * a[0] + b[0], from[1] - 2 * a[1] + b[1]), Math.hypot(a[0] - 2 * b[0] + c[0], a[1] - 2 * b[1] + c[1]))
      const count = Math.min(500, Math.max(1, Math.ceil(Math.sqrt(0.75 * bend / FLATTEN))))
      for (let k = 1; k <= count; k++) ring.push(onCurve(from, a, b, c, k / count))
      from = c
    }
    else if (a) {
      ring.push(a)
      from = a
    }
  }
  if (ring.some(([x, y]) => !Number.isFinite(x) || !Number.isFinite(y))) throw new SvgRefusal('One of its outlines runs out of all bounds.')
  const same = (p: FlatPoint, q: FlatPoint | undefined) => q !== undefined && Math.hypot(p[0] - q[0], p[1] - q[1]) < 1e-6
  const apart = ring.filter((point, i) => !same(point, ring[i - 1]))
  const [first] = apart
  return first && apart.length > 1 && same(first, apart.at(-1)) ? apart.slice(0, -1) : apart
}

function onCurve(p: FlatPoint, a: FlatPoint, b: FlatPoint, c: FlatPoint, t: number): FlatPoint {
  const r = 1 - t
  const at = (i: 0 | 1) => r * r * r * p[i] + 3 * r * r * t * a[i] + 3 * r * t * t * b[i] + t * t * t * c[i]
  return [at(0), at(1)]
}
