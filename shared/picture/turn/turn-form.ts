import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { sideBox, type SideBox } from '#shared/blank/fit-view'
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
  /** What it fills in the side view, and half of what it fills across. */
  box: SideBox
  halfWidth: number
}

/** Builds the form of a blank; `layout` is how its fins lie on their sheet. */
export function turnForm(blank: PreparedBlank, layout: FinLayout | undefined): TurnForm {
  const { shape, measures } = blank
  return {
    body: bodyMesh(blank),
    fins: layout && finMesh(blank, layout),
    eyes: eyeMesh(blank),
    lip: shape.lip && lipMesh(shape.lip),
    wire: wireMesh(blank),
    box: sideBox(blank),
    halfWidth: Math.max(measures.width, shape.lip?.width ?? 0) / 2,
  }
}
