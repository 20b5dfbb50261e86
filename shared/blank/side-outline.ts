import type { BlankShape, SidePoint } from './blank-shape'
import { finOutline } from './fin-outline'
import { contourAt, newSection, profileOf } from './profile'
import { ringRadius } from './ring'
import { toHundredth } from './to-hundredth'

/** A place in a line drawing, mm: x to the right from the nose, y down as SVG has it. */
export type DrawingPoint = readonly [x: number, y: number]

/** A blank as lines, seen from the left side, in hundredths of a millimetre. Draw fins and lip first, the body over them. */
export interface SideOutline {
  /** Closed outline of the body. */
  body: DrawingPoint[]
  /** Closed outlines. */
  fins: { id: string, points: DrawingPoint[] }[]
  /** Closed outline of the lip on edge. */
  lip?: DrawingPoint[]
  eye: { x: number, y: number, radius: number }
  /** Open lines. */
  mouth: DrawingPoint[]
  joints: DrawingPoint[][]
  rings: { x: number, y: number, radius: number }[]
  /** The box around all of it. */
  box: { x: number, y: number, width: number, height: number }
}

const STEPS = 60

/** Points as the `d` of an SVG path, rounded to a hundredth of a millimetre. */
export function svgPath(points: readonly DrawingPoint[], isClosed = true): string {
  const line = points.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${toHundredth(x)} ${toHundredth(y)}`).join('')
  return isClosed && points.length > 0 ? `${line}Z` : line
}

/** A place in a line drawing, in hundredths, so that Node and every browser write the same figures. */
export function drawingPoint(x: number, y: number): DrawingPoint {
  return [toHundredth(x), toHundredth(y)]
}

const down = ([x, y]: SidePoint | readonly [number, number]): DrawingPoint => drawingPoint(x, -y)
const round = (x: number, y: number, radius: number) => ({ x: toHundredth(x), y: toHundredth(y), radius: toHundredth(radius) })

/** Line drawing of a blank for lists, diagrams and cards. */
export function sideOutline(shape: BlankShape): SideOutline {
  const profile = profileOf(shape)
  const section = newSection()
  const back: DrawingPoint[] = []
  const belly: DrawingPoint[] = []
  for (let i = 0; i <= STEPS; i++) {
    profile.section(i / STEPS, section)
    back.push(drawingPoint(section.x, -(section.c + section.h)))
    belly.push(drawingPoint(section.x, -(section.c - section.h)))
  }
  const body = [...back, ...belly.reverse()]
  const fins = shape.fins.map((fin) => {
    const outline = finOutline(fin, profile)
    return { id: fin.id, points: Array.from(outline.xs, (x, i) => drawingPoint(x, -(outline.ys[i] ?? 0))) }
  })
  const joints = shape.joints.map((joint) => {
    const contour = contourAt(profile, joint.x)
    return Array.from({ length: 13 }, (_, i) => {
      const y = contour.back + (contour.belly - contour.back) * i / 12
      return drawingPoint(joint.x + y * (joint.lean + joint.bow * y), -y)
    })
  })
  const radius = ringRadius(shape.length)
  const rings = [shape.tie, ...shape.hangers].map((ring) => {
    const angle = ring.angle * Math.PI / 180
    return round(ring.x + radius * Math.cos(angle), -(ring.y + radius * Math.sin(angle)), radius)
  })
  const lip = lipOutline(shape)
  const all = [...body, ...fins.flatMap(fin => fin.points), ...(lip ?? []), ...rings.flatMap(ring => [
    [ring.x - 1.2 * radius, ring.y - 1.2 * radius] as const, [ring.x + 1.2 * radius, ring.y + 1.2 * radius] as const,
  ])]
  const [left, right] = [Math.min(...all.map(([x]) => x)), Math.max(...all.map(([x]) => x))]
  const [high, low] = [Math.min(...all.map(([, y]) => y)), Math.max(...all.map(([, y]) => y))]
  return {
    body, fins, ...(lip && { lip }),
    eye: round(shape.eye.x, -shape.eye.y, shape.eye.radius),
    mouth: shape.mouth.map(down),
    joints, rings,
    box: { x: toHundredth(left), y: toHundredth(high), width: toHundredth(right - left), height: toHundredth(low - high) },
  }
}

function lipOutline(shape: BlankShape): DrawingPoint[] | undefined {
  const { lip } = shape
  if (!lip) return undefined
  const angle = lip.angle * Math.PI / 180
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)]
  const [px, py] = [sin * lip.thickness / 2, -cos * lip.thickness / 2]
  const [tx, ty] = [lip.x - lip.length * cos, lip.y - lip.length * sin]
  return ([[lip.x + px, lip.y + py], [lip.x - px, lip.y - py], [tx - px, ty - py], [tx + px, ty + py]] as const).map(down)
}
