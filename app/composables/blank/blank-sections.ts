import type { BlankShape } from '#shared/blank/blank-shape'
import type { DrawingPoint } from '#shared/blank/side-outline'
import { newSection, profileOf, tOfShare } from '#shared/blank/profile'
import { girthPoint, newSurfacePoint } from '#shared/blank/surface-point'

const STEPS = 60

/** A blank seen from above: closed outline, mm, nose left, y across the body. */
export function topOutline(shape: BlankShape): DrawingPoint[] {
  const profile = profileOf(shape)
  const section = newSection()
  const half = Array.from({ length: STEPS + 1 }, (_, i): DrawingPoint => {
    profile.section(i / STEPS, section)
    return [section.x, -section.w]
  })
  return [...half, ...half.toReversed().map(([x, y]): DrawingPoint => [x, -y])]
}

/** A cut across a blank: where it was cut, and its closed outline, mm, y down. */
export interface CrossCut { x: number, outline: DrawingPoint[], height: number, width: number }

/** The cross-section of a blank at a share of its length. */
export function crossCut(shape: BlankShape, share: number): CrossCut {
  const section = newSection()
  profileOf(shape).section(tOfShare(share), section)
  const point = newSurfacePoint()
  const outline = Array.from({ length: STEPS }, (_, i): DrawingPoint => {
    girthPoint(section, 2 * Math.PI * i / STEPS, point)
    return [point.z, -point.y]
  })
  return { x: section.x, outline, height: 2 * section.h, width: 2 * section.w }
}

/** Where a body is fullest, as a share of its length: the best place for its section. */
export function fullestShare(shape: BlankShape): number {
  const cuts = Array.from({ length: 41 }, (_, i) => 0.1 + 0.8 * i / 40)
  const girth = (share: number) => {
    const { height, width } = crossCut(shape, share)
    return height * width
  }
  return cuts.reduce((best, share) => girth(share) > girth(best) ? share : best, 0.5)
}
