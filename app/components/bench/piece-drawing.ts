import { boxRound, closedLine } from '../ui/blank-line'

/** A blank's outline made ready once, to be drawn on every piece of a batch. */
export interface PieceDrawing {
  /** SVG path data of the outline, and the box round it. */
  line: string
  viewBox: string
  left: number
  top: number
  width: number
  height: number
}

/** More strokes than this cannot be told apart: the figure alone counts then. */
const STROKES_MAX = 8

/** Makes an outline ready. @throws {RangeError} below three points */
export function pieceDrawing(outline: readonly (readonly [number, number])[]): PieceDrawing {
  const [xs, ys] = [outline.map(point => point[0]), outline.map(point => point[1])]
  const [left, top] = [Math.min(...xs), Math.min(...ys)]
  const width = Math.max(...xs) - left
  return { line: closedLine(outline), viewBox: boxRound(outline, width * 0.02), left, top, width, height: Math.max(...ys) - top }
}

/** Passes as dagger strokes on the flank, one over the other; none where there are too many to count by eye. */
export function passStrokes({ left, top, width, height }: PieceDrawing, laid: number, of: number): { n: number, isLaid: boolean, d: string }[] {
  if (of > STROKES_MAX) return []
  const step = Math.min(height * 0.2, height * 0.72 / of)
  const [long, thick] = [width * 0.5, step * 0.42]
  return Array.from({ length: Math.max(of, Math.min(laid, STROKES_MAX)) }, (_, n) => {
    const [x, y] = [left + width * (0.24 + 0.02 * (n % 2)), top + height * 0.48 + (n - (of - 1) / 2) * step]
    return { n, isLaid: n < laid, d: `M${x} ${y}c${long * 0.3} ${-thick} ${long * 0.7} ${-thick} ${long} 0c${-long * 0.35} ${thick * 1.1} ${-long * 0.72} ${thick * 1.1} ${-long} 0Z` }
  })
}
