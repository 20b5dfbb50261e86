import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { sideBox } from '#shared/blank/fit-view'
import { newSection } from '#shared/blank/profile'
import { girthPoint, newSurfacePoint } from '#shared/blank/surface-point'
import { ringRadius } from '#shared/blank/ring'
import { bodyMesh } from './body-mesh'
import { eyeMesh } from './eye-mesh'
import { finMesh } from './fin-mesh'
import type { FinLayout } from './fin-sheet'
import { lipMesh, wireMesh } from './hardware-mesh'
import type { TurnMesh } from './mesh'

/** Everything of a blank that can be turned, as triangles in the body frame, mm. */
export interface TurnForm {
  body: TurnMesh
  fins: TurnMesh | undefined
  eyes: TurnMesh
  lip: TurnMesh | undefined
  wire: TurnMesh
  reach: TurnReach
}

/** How far a blank reaches. */
export interface TurnReach {
  /** What it turns about, mm: the middle of what it fills in the side view. */
  pivot: readonly [x: number, y: number]
  /** Half of what it fills in the side view, and across. */
  long: number
  tall: number
  wide: number
  /** Places it reaches farthest to, mm from the pivot, three numbers each. */
  tips: Float32Array
}

const [RINGS, ROUND] = [28, 12]

/** Builds the form of a blank; `layout` is how its fins lie on their sheet. */
export function turnForm(blank: PreparedBlank, layout: FinLayout | undefined): TurnForm {
  const { shape } = blank
  return {
    body: bodyMesh(blank),
    fins: layout && finMesh(blank, layout),
    eyes: eyeMesh(blank),
    lip: shape.lip && lipMesh(shape.lip),
    wire: wireMesh(blank),
    reach: turnReach(blank),
  }
}

/** How far a blank with its fins, lip and rings reaches when it is turned. */
export function turnReach(blank: PreparedBlank): TurnReach {
  const { shape, profile, fins, measures } = blank
  const box = sideBox(blank)
  const pivot = [(box.left + box.right) / 2, (box.low + box.high) / 2] as const
  const tips: number[] = []
  const reachTo = (x: number, y: number, z: number) => tips.push(x - pivot[0], y - pivot[1], z)
  const section = newSection(), point = newSurfacePoint()
  for (let ring = 0; ring <= RINGS; ring++) {
    profile.section(ring / RINGS, section)
    for (let k = 0; k <= ROUND; k++) {
      girthPoint(section, Math.PI * k / ROUND, point)
      for (const side of [1, -1]) reachTo(section.x, point.y, side * point.z)
    }
  }
  for (const { xs, ys } of fins) xs.forEach((x, i) => reachTo(x, ys[i]!, 0))
  const lip = shape.lip && lipMesh(shape.lip).position
  for (let i = 0; lip && i < lip.length; i += 3) reachTo(lip[i]!, lip[i + 1]!, lip[i + 2]!)
  const radius = ringRadius(shape.length)
  for (const { x, y, angle } of [shape.tie, ...shape.hangers]) {
    const turn = angle * Math.PI / 180
    reachTo(x + 2.2 * radius * Math.cos(turn), y + 2.2 * radius * Math.sin(turn), 0)
  }
  return {
    pivot, long: (box.right - box.left) / 2, tall: (box.high - box.low) / 2,
    wide: Math.max(measures.width, shape.lip?.width ?? 0) / 2, tips: Float32Array.from(tips),
  }
}
