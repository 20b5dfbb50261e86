import { newSection, tOfShare, type Profile, type Section } from './profile'
import { girthPoint, surfacePoint, type SurfacePoint } from './surface-point'
import { hermite } from './surface-table'
import type { ViewTurn } from './view'

const CIRCLE = 64
const STEP = 2 * Math.PI / CIRCLE

/**
 * One column of a view: the section under it and its visible half from highest to lowest point.
 * Heights are in the rolled frame, mm: y·cos - z·sin.
 */
export interface ViewColumn {
  section: Section
  /** Highest and lowest height of the section, and their girth angles; the visible half runs from `phiHigh` up to `phiLow`. */
  high: number
  low: number
  phiHigh: number
  phiLow: number
  /** Girth angles and heights of the visible half, `count` of them, falling in height, and the change of height with angle. */
  phis: Float64Array
  heights: Float64Array
  slopes: Float64Array
  count: number
  /** Where the last search ended. */
  cursor: number
}

/** A column to fill. */
export function newViewColumn(): ViewColumn {
  return {
    section: newSection(), high: 0, low: 0, phiHigh: 0, phiLow: Math.PI,
    phis: new Float64Array(CIRCLE + 3), heights: new Float64Array(CIRCLE + 3), slopes: new Float64Array(CIRCLE + 3), count: 0, cursor: 0,
  }
}

function extreme(section: Section, turn: ViewTurn, phi: number, sign: 1 | -1, point: SurfacePoint): number {
  let low = phi - STEP
  let high = phi + STEP
  // The slope falls through zero at the highest point and rises at the lowest.
  for (let i = 0; i < 22; i++) {
    const middle = (low + high) / 2
    girthPoint(section, middle, point)
    if (sign * (point.yf * turn.cos - point.zf * turn.sin) > 0) low = middle
    else high = middle
  }
  return (low + high) / 2
}

/**
 * Fills a column at x mm from the nose.
 * @returns false beside the body, where there is nothing to see
 */
export function fillViewColumn(profile: Profile, turn: ViewTurn, x: number, point: SurfacePoint, out: ViewColumn): boolean {
  if (x <= 0 || x >= profile.length) return false
  const { section, phis, heights, slopes } = out
  profile.section(tOfShare(x / profile.length), section)
  if (section.h <= 0 || section.w <= 0) return false
  const heightAt = (phi: number) => {
    girthPoint(section, phi, point)
    return point.y * turn.cos - point.z * turn.sin
  }
  if (turn.sin === 0) {
    out.phiHigh = turn.cos > 0 ? 0 : Math.PI
    out.phiLow = out.phiHigh + Math.PI
  }
  else {
    let [best, worst, high, low] = [-Infinity, Infinity, 0, 0]
    for (let k = 0; k < CIRCLE; k++) {
      const height = heightAt(k * STEP)
      if (height > best) [best, high] = [height, k]
      if (height < worst) [worst, low] = [height, k]
    }
    out.phiHigh = extreme(section, turn, high * STEP, 1, point)
    out.phiLow = extreme(section, turn, low * STEP, -1, point)
    if (out.phiLow < out.phiHigh) out.phiLow += 2 * Math.PI
  }
  out.high = heightAt(out.phiHigh)
  out.low = heightAt(out.phiLow)
  phis[0] = out.phiHigh
  heights[0] = out.high
  let count = 1
  for (let k = Math.floor(out.phiHigh / STEP) + 1; k * STEP < out.phiLow; k++) {
    const phi = k * STEP
    if (phi - out.phiHigh < 1e-3 || out.phiLow - phi < 1e-3) continue
    phis[count] = phi
    heights[count] = heightAt(phi)
    slopes[count] = point.yf * turn.cos - point.zf * turn.sin
    count++
  }
  phis[count] = out.phiLow
  heights[count] = out.low
  out.count = count + 1
  out.cursor = 0
  return true
}

/** Gaps next to the highest and lowest point in which the angle runs too steeply with height to be looked up. */
const STEEP = 2

/** Girth angle of the visible place at a height of the rolled frame, to 1e-5. Asking for heights in order is quickest. */
export function phiAtHeight(column: ViewColumn, turn: ViewTurn, height: number, point: SurfacePoint): number {
  const { phis, heights, slopes, section } = column
  const last = column.count - 2
  let k = column.cursor
  while (k < last && (heights[k + 1] as number) > height) k++ // k stays within the filled half
  while (k > 0 && (heights[k] as number) < height) k--
  column.cursor = k
  const [a, b] = [phis[k] as number, phis[k + 1] as number]
  const rise = (heights[k + 1] as number) - (heights[k] as number)
  const share = (height - (heights[k] as number)) / rise
  if (k > STEEP && k < last - STEEP) {
    return hermite(a, 1 / (slopes[k] as number), b, 1 / (slopes[k + 1] as number), rise, share)
  }
  // Beside the highest and lowest point the height runs like a square.
  const f = k === 0 ? Math.sqrt(Math.max(0, share)) : k === last ? 1 - Math.sqrt(Math.max(0, 1 - share)) : share
  let phi = a + f * (b - a)
  const rounds = k === 0 || k === last ? 3 : 2
  for (let i = 0; i < rounds; i++) {
    girthPoint(section, phi, point)
    const slope = point.yf * turn.cos - point.zf * turn.sin
    if (slope > -1e-9) break
    phi -= (point.y * turn.cos - point.z * turn.sin - height) / slope
    if (phi < a) phi = a
    else if (phi > b) phi = b
  }
  return phi
}

/** Change of the outline's height with x at the highest (or lowest) point of a column. */
export function outlineSlope(column: ViewColumn, turn: ViewTurn, phi: number, point: SurfacePoint): number {
  surfacePoint(column.section, phi, point)
  return (point.yt * turn.cos - point.zt * turn.sin) / column.section.xt
}
