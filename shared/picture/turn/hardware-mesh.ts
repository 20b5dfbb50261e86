import type { Joint, Lip, RingPlace } from '#shared/blank/blank-shape'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { contourAt } from '#shared/blank/profile'
import { ringRadius } from '#shared/blank/ring'
import { addCorner, addQuad, finishMesh, meshDraft, type MeshDraft, type TurnMesh } from './mesh'

/** Half the thickness of the wire of a ring, share of its radius: as stout as the side view draws it. */
const WIRE = 0.29
const [ROUND_RING, ROUND_WIRE] = [40, 14]
/** Rounded corners of a lip, share of its smaller side, and steps in each. */
const CORNER = { share: 0.3, steps: 7 }
const radians = (degrees: number) => degrees * Math.PI / 180

type Vector = readonly [number, number, number]

/** Rings with their stems, and the pins of joints: steel. */
export function wireMesh({ shape, profile }: PreparedBlank): TurnMesh {
  const mesh = meshDraft()
  const radius = ringRadius(shape.length)
  for (const ring of [shape.tie, ...shape.hangers]) addRing(mesh, ring, radius)
  for (const joint of shape.joints) addPins(mesh, joint, contourAt(profile, joint.x))
  return finishMesh(mesh)
}

function addRing(mesh: MeshDraft, { x, y, angle }: RingPlace, radius: number): void {
  const [dx, dy] = [Math.cos(radians(angle)), Math.sin(radians(angle))]
  const wire = WIRE * radius
  const first = mesh.kept.length
  for (let i = 0; i <= ROUND_RING; i++) {
    const way = 2 * Math.PI * i / ROUND_RING
    const [cx, cy] = [Math.cos(way), Math.sin(way)]
    for (let k = 0; k <= ROUND_WIRE; k++) {
      const turn = 2 * Math.PI * k / ROUND_WIRE
      const [out, up] = [Math.cos(turn), Math.sin(turn)]
      const reach = radius + wire * out
      addCorner(mesh, { at: [x + radius * dx + reach * cx, y + radius * dy + reach * cy, wire * up], normal: [out * cx, out * cy, up] })
    }
  }
  joinRings(mesh, first, ROUND_RING, ROUND_WIRE)
  addRod(mesh, [x - radius * dx, y - radius * dy, 0], [x, y, 0], wire)
}

function addPins(mesh: MeshDraft, joint: Joint, { back, belly, centre }: { back: number, belly: number, centre: number }): void {
  const reach = joint.gap / 2 + 0.3
  for (const off of [1, -1]) {
    const y = centre + off * (back - belly) / 4
    const x = joint.x + y * (joint.lean + joint.bow * y)
    addRod(mesh, [x - reach, y, 0], [x + reach, y, 0], 0.4 * joint.gap)
  }
}

/** A round rod in the mid-plane, without its ends: both lie inside something. */
function addRod(mesh: MeshDraft, from: Vector, to: Vector, radius: number): void {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1])
  if (length === 0) return
  const [ax, ay] = [(to[0] - from[0]) / length, (to[1] - from[1]) / length]
  const first = mesh.kept.length
  for (const end of [from, to]) {
    for (let k = 0; k <= ROUND_WIRE; k++) {
      const turn = 2 * Math.PI * k / ROUND_WIRE
      const [side, up] = [Math.cos(turn), Math.sin(turn)]
      const normal: Vector = [ay * side, -ax * side, up]
      addCorner(mesh, { at: [end[0] + radius * normal[0], end[1] + radius * normal[1], radius * normal[2]], normal })
    }
  }
  joinRings(mesh, first, 1, ROUND_WIRE)
}

function joinRings(mesh: MeshDraft, first: number, rings: number, round: number): void {
  for (let i = 0; i < rings; i++) {
    for (let k = 0; k < round; k++) {
      const a = first + i * (round + 1) + k
      addQuad(mesh, a, a + round + 1, a + round + 2, a + 1)
    }
  }
}

/** A diving lip: a plate with rounded corners. `uv` holds the mm to the nearest edge of the face, or of the cut, which it marks with 1. */
export function lipMesh(lip: Lip): TurnMesh {
  const mesh = meshDraft()
  const angle = radians(lip.angle)
  const along: Vector = [-Math.cos(angle), -Math.sin(angle), 0], facing: Vector = [Math.sin(angle), -Math.cos(angle), 0]
  const outline = lipOutline(lip)
  const at = ([d, z]: readonly [number, number], way: number): Vector => [
    lip.x + d * along[0] + way * lip.thickness / 2 * facing[0], lip.y + d * along[1] + way * lip.thickness / 2 * facing[1], z,
  ]
  const inset = Math.min(0.5, 0.18 * Math.min(lip.length, lip.width))
  const inner = outline.map(([d, z]) => [Math.min(lip.length - inset, Math.max(inset, d)), Math.min(lip.width / 2 - inset, Math.max(inset - lip.width / 2, z))] as const)
  const middle = [lip.length / 2, 0] as const
  for (const way of [1, -1] as const) {
    const normal: Vector = [way * facing[0], way * facing[1], 0]
    const corner = (place: readonly [number, number], rim: number) => addCorner(mesh, { at: at(place, way), normal, uv: [rim, 0] })
    const centre = corner(middle, inset)
    outline.forEach((place, i) => {
      const j = (i + 1) % outline.length
      const [a, b, c, d] = [corner(place, 0), corner(outline[j]!, 0), corner(inner[j]!, inset), corner(inner[i]!, inset)]
      if (way < 0) {
        addQuad(mesh, a, b, c, d)
        mesh.index.push(centre, d, c)
      }
      else {
        addQuad(mesh, a, d, c, b)
        mesh.index.push(centre, c, d)
      }
    })
  }
  outline.forEach((place, i) => {
    const next = outline[(i + 1) % outline.length]!
    const [ex, ez] = [next[0] - place[0], next[1] - place[1]]
    const size = Math.hypot(ex, ez)
    if (size === 0) return
    const out = [ez / size, -ex / size] as const
    const normal: Vector = [out[0] * along[0], out[0] * along[1], out[1]]
    const corner = (p: readonly [number, number], way: number) => addCorner(mesh, { at: at(p, way), normal, uv: [(1 - Math.abs(way)) * lip.thickness / 2, 1] })
    for (const way of [1, 0]) addQuad(mesh, corner(place, way), corner(next, way), corner(next, way - 1), corner(place, way - 1))
  })
  return finishMesh(mesh)
}

/** Outline of a lip in its own plane, mm from the slot and to the left: square at the slot, rounded at the tip. */
function lipOutline({ length, width }: Lip): (readonly [number, number])[] {
  const radius = CORNER.share * Math.min(length, width)
  const half = width / 2
  const corner = (z: number, from: number) => Array.from({ length: CORNER.steps + 1 }, (_, i) => {
    const turn = from + Math.PI / 2 * i / CORNER.steps
    return [length - radius + radius * Math.cos(turn), z + radius * Math.sin(turn)] as const
  })
  return [[0, -half], ...corner(-half + radius, -Math.PI / 2), ...corner(half - radius, 0), [0, half]]
}
