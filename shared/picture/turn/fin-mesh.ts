import type { FinOutline } from '#shared/blank/fin-outline'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { finSheetPlace, type FinLayout } from './fin-sheet'
import { addCorner, addQuad, finishMesh, meshDraft, type MeshDraft, type TurnMesh } from './mesh'
import { signedArea, triangulate } from './triangulate'

/** Thickness of a fin, mm at a body of 100 mm (common practice: .6-.8 mm sheet). */
const THICKNESS = 0.65

/** Every fin of a blank as a thin plate: two faces on the fin sheet, and the rim between them. */
export function finMesh(blank: PreparedBlank, layout: FinLayout): TurnMesh {
  const mesh = meshDraft()
  const half = Math.min(1, Math.max(0.4, THICKNESS * blank.shape.length / 100)) / 2
  blank.fins.forEach((fin, index) => addFin(mesh, fin, half, (x, y, side) => finSheetPlace(layout, fin, index, x, y, side)))
  return finishMesh(mesh)
}

type Place = (x: number, y: number, side: 1 | -1) => [number, number]

function addFin(mesh: MeshDraft, fin: FinOutline, half: number, place: Place): void {
  const { xs, ys } = fin
  const triangles = triangulate(xs, ys)
  for (const side of [1, -1] as const) {
    const first = mesh.kept.length
    xs.forEach((x, i) => addCorner(mesh, { at: [x, ys[i]!, side * half], normal: [0, 0, side], uv: place(x, ys[i]!, side) }))
    for (let t = 0; t < triangles.length; t += 3) {
      const [a, b, c] = [first + triangles[t]!, first + triangles[t + 1]!, first + triangles[t + 2]!]
      mesh.index.push(a, ...(side > 0 ? [b, c] : [c, b]))
    }
  }
  addRim(mesh, fin, half, place)
}

function addRim(mesh: MeshDraft, { xs, ys }: FinOutline, half: number, place: Place): void {
  // Round the outline the way the triangles go: then outward is to the right.
  const way = signedArea(xs, ys) > 0 ? 1 : -1
  for (let i = 0; i < xs.length; i++) {
    const j = (i + 1) % xs.length
    const [from, to] = way > 0 ? [i, j] : [j, i]
    const [ax, ay, bx, by] = [xs[from]!, ys[from]!, xs[to]!, ys[to]!]
    const size = Math.hypot(bx - ax, by - ay)
    if (size === 0) continue
    const normal = [(by - ay) / size, (ax - bx) / size, 0] as const
    const corner = (x: number, y: number, z: number) => addCorner(mesh, { at: [x, y, z], normal, uv: place(x, y, 1), own: 1 })
    addQuad(mesh, corner(ax, ay, half), corner(ax, ay, -half), corner(bx, by, -half), corner(bx, by, half))
  }
}
