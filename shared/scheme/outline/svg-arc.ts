import type { FlatPoint } from './flat'
import type { PathPiece } from './svg-path'

/** Longest part of an arc drawn as one curve: off by less than 5 millionths of the radius. */
const PART = Math.PI / 4

/**
 * An arc of an ellipse as curves (SVG 2, appendix B.2: from ends to middle, radii grown where they do not reach).
 *
 * @param numbers rx, ry, turn in degrees, large-arc flag, sweep flag
 */
export function arcCurves(from: FlatPoint, numbers: readonly number[], to: FlatPoint): PathPiece[] {
  const [rx0 = 0, ry0 = 0, degrees = 0, isLarge = 0, sweeps = 0] = numbers
  if (from[0] === to[0] && from[1] === to[1]) return []
  let [rx, ry] = [Math.abs(rx0), Math.abs(ry0)]
  if (rx === 0 || ry === 0) return [[to]]
  const turn = degrees * Math.PI / 180
  const [cos, sin] = [Math.cos(turn), Math.sin(turn)]
  const [dx, dy] = [(from[0] - to[0]) / 2, (from[1] - to[1]) / 2]
  const [x1, y1] = [cos * dx + sin * dy, cos * dy - sin * dx]
  const short = (x1 / rx) ** 2 + (y1 / ry) ** 2
  if (short > 1) {
    rx *= Math.sqrt(short)
    ry *= Math.sqrt(short)
  }
  const under = (rx * y1) ** 2 + (ry * x1) ** 2
  const far = (isLarge === sweeps ? -1 : 1) * Math.sqrt(Math.max(0, (rx * ry) ** 2 - under) / under)
  const [cx1, cy1] = [far * rx * y1 / ry, -far * ry * x1 / rx]
  const [cx, cy] = [cos * cx1 - sin * cy1 + (from[0] + to[0]) / 2, sin * cx1 + cos * cy1 + (from[1] + to[1]) / 2]
  const start = Math.atan2((y1 - cy1) / ry, (x1 - cx1) / rx)
  let round = Math.atan2((-y1 - cy1) / ry, (-x1 - cx1) / rx) - start
  if (sweeps && round < 0) round += 2 * Math.PI
  if (!sweeps && round > 0) round -= 2 * Math.PI

  const count = Math.max(1, Math.ceil(Math.abs(round) / PART))
  const step = round / count
  const reach = 4 / 3 * Math.tan(step / 4)
  const at = (x: number, y: number): FlatPoint => [cx + cos * rx * x - sin * ry * y, cy + sin * rx * x + cos * ry * y]
  return Array.from({ length: count }, (_, k): PathPiece => {
    const [a, b] = [start + k * step, start + (k + 1) * step]
    const [ca, sa, cb, sb] = [Math.cos(a), Math.sin(a), Math.cos(b), Math.sin(b)]
    return [at(ca - reach * sa, sa + reach * ca), at(cb + reach * sb, sb - reach * cb), k === count - 1 ? to : at(cb, sb)]
  })
}
