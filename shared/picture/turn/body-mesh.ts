import type { Joint } from '#shared/blank/blank-shape'
import { jointDip, jointPlace, type JointPlace } from '#shared/blank/joint-place'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { newSection } from '#shared/blank/profile'
import { newSurfacePoint, surfacePoint } from '#shared/blank/surface-point'
import { fillSurfaceRow, newSurfaceRow, rowV, shareOfV } from '#shared/blank/surface-table'
import { GAP_LIGHT } from '../paint-light'
import { sheetPlace } from './body-sheet'
import { addCorner, addQuad, finishMesh, meshDraft, type MeshDraft, type TurnMesh } from './mesh'

/** Steps along a whole body, even in t, and round it. */
const STEPS_ALONG = 150
const STEPS_ROUND = 96
/** Between two parts a dark web is seen in the mid-plane, this deep under the skin: in radii of the rounded edge; half as thick, mm. */
const WEB = { deep: 1.25, kept: 0.06, half: 0.05 }
/** Rows beside a joint, in radii of its rounded edge. */
const EDGE_ROWS = [0.03, 0.1, 0.2, 0.35, 0.55, 0.8, 1.1] as const
/** The meridians meet at closed ends; a hair before, each still has its direction. */
const END = 1e-5
const HALVINGS = 30

/** One end of a part of the body: nose or tail, or a joint. */
interface End { joint: Joint | null, t: number }

/**
 * The body as triangles, cut through at its joints: skin with rounded edges, and dark inner faces. `uv` is the place on the body
 * sheet, which runs once round the body, so that left and right flank share the lines of back and belly.
 */
export function bodyMesh(blank: PreparedBlank): TurnMesh {
  const mesh = meshDraft()
  const joints = [...blank.shape.joints].sort((a, b) => a.x - b.x)
  const ends: End[] = [{ joint: null, t: END }, ...joints.map(joint => ({ joint, t: 0 })), { joint: null, t: 1 - END }]
  const rings = ends.slice(1).map((to, i) => addPart(blank, mesh, ends[i]!, to))
  joints.forEach((joint, i) => addWeb(mesh, rings[i]!.last, rings[i + 1]!.first, WEB.deep * joint.round))
  return finishMesh(mesh)
}

interface Pen { section: ReturnType<typeof newSection>, point: ReturnType<typeof newSurfacePoint>, row: ReturnType<typeof newSurfaceRow>, joint: JointPlace }

/** Adds one part. @returns the first corners of its first and its last ring */
function addPart(blank: PreparedBlank, mesh: MeshDraft, from: End, to: End): { first: number, last: number } {
  const pen: Pen = { section: newSection(), point: newSurfacePoint(), row: newSurfaceRow(), joint: { distance: Infinity, round: 1, towardX: 0, towardY: 0 } }
  const angles = Array.from({ length: STEPS_ROUND + 1 }, (_, k) => 2 * Math.PI * k / STEPS_ROUND)
  const starts = angles.map(phi => edgeAt(blank, pen, from, phi, 1))
  const stops = angles.map(phi => edgeAt(blank, pen, to, phi, -1))
  const rows = rowsOf(blank, from, to, starts[0]!, stops[0]!)
  const first = mesh.kept.length
  const width = angles.length
  for (const share of rows) {
    angles.forEach((phi, k) => addSkin(blank, mesh, pen, starts[k]! + (stops[k]! - starts[k]!) * share, phi, k === STEPS_ROUND))
  }
  for (let r = 0; r + 1 < rows.length; r++) {
    for (let k = 0; k < STEPS_ROUND; k++) {
      const a = first + r * width + k
      addQuad(mesh, a, a + 1, a + 1 + width, a + width)
    }
  }
  addEnd(mesh, first, -1, from.joint ? GAP_LIGHT : 1)
  const last = first + (rows.length - 1) * width
  addEnd(mesh, last, 1, to.joint ? GAP_LIGHT : 1)
  return { first, last }
}

/** Where a part ends on the meridian of φ; `way` 1 for its end toward the nose. */
function edgeAt({ profile }: PreparedBlank, { section, point }: Pen, { joint, t }: End, phi: number, way: 1 | -1): number {
  if (!joint) return t
  let low = 0, high = 1
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2
    profile.section(middle, section)
    surfacePoint(section, phi, point)
    const slope = joint.lean + 2 * joint.bow * point.y
    const across = (section.x - joint.x - point.y * (joint.lean + joint.bow * point.y)) / Math.sqrt(1 + slope * slope)
    if (across < way * joint.gap / 2) low = middle
    else high = middle
  }
  return (low + high) / 2
}

/** Shares along a part at which it gets a ring of corners: even in t, closer beside joints. */
function rowsOf({ profile }: PreparedBlank, from: End, to: End, start: number, stop: number): number[] {
  const steps = Math.max(12, Math.ceil(STEPS_ALONG * (stop - start)))
  const rows = new Set(Array.from({ length: steps + 1 }, (_, i) => i / steps))
  const section = newSection()
  for (const [end, at, way] of [[from, start, 1], [to, stop, -1]] as const) {
    if (!end.joint) continue
    profile.section(at, section)
    const reach = end.joint.round / Math.max(1e-6, section.xt * (stop - start))
    for (const edge of EDGE_ROWS) if (edge * reach < 0.5) rows.add(way > 0 ? edge * reach : 1 - edge * reach)
  }
  return [...rows].sort((a, b) => a - b)
}

function addSkin({ profile, table, shape }: PreparedBlank, mesh: MeshDraft, { section, point, row, joint }: Pen, t: number, phi: number, isLast: boolean): void {
  const isLeft = phi <= Math.PI
  const half = isLast ? 0 : isLeft ? phi : 2 * Math.PI - phi
  if (section.t !== t) profile.section(t, section)
  surfacePoint(section, half, point)
  if (row.t !== t) fillSurfaceRow(table, t, row)
  const side = isLeft ? 1 : -1
  jointPlace(shape.joints, section.x, point.y, joint)
  // What is bent inward beside a joint stays on its own side of the body.
  const dip = Math.min(joint.distance < joint.round ? jointDip({ ...joint, distance: Math.max(0, joint.distance) }) : 0, 0.5 * Math.min(section.h, section.w))
  const [u, v] = [row.u, shareOfV(row, rowV(row, half))]
  addCorner(mesh, {
    at: [section.x - dip * point.nx, point.y - dip * point.ny, side * (point.z - dip * point.nz)],
    normal: [point.nx, point.ny, side * point.nz],
    uv: isLast ? [u, 1] : sheetPlace(u, v, side),
  })
}

const placeOf = ({ position }: MeshDraft, corner: number) => [0, 1, 2].map(c => position[3 * corner + c]!) as [number, number, number] // three by the list

function middleOf(mesh: MeshDraft, ring: number): [number, number, number] {
  const middle: [number, number, number] = [0, 0, 0]
  for (let k = 0; k < STEPS_ROUND; k++) placeOf(mesh, ring + k).forEach((value, c) => middle[c]! += value / STEPS_ROUND)
  return middle
}

/** Joins the rings on both sides of a gap by a thin web that ends `deep` mm under the skin, so that one does not look through. */
function addWeb(mesh: MeshDraft, from: number, to: number, deep: number): void {
  const middles = [middleOf(mesh, from), middleOf(mesh, to)] as const
  const inner = [from, to].map((ring, end) => {
    const first = mesh.kept.length
    for (let k = 0; k <= STEPS_ROUND; k++) {
      const at = placeOf(mesh, ring + k), out = at.map((value, c) => value - middles[end]![c]!)
      const size = Math.hypot(...out)
      const share = 1 - Math.min(0.6, deep / Math.max(1e-6, size))
      const side = Math.sign(out[2]!)
      addCorner(mesh, {
        at: [at[0], middles[end]![1]! + share * out[1]!, side * WEB.half],
        normal: [0, side === 0 ? Math.sign(out[1]!) : 0, side], uv: [mesh.uv[2 * (ring + k)]!, mesh.uv[2 * (ring + k) + 1]!], kept: WEB.kept, own: 1,
      })
    }
    return first
  }) as [number, number]
  for (let k = 0; k < STEPS_ROUND; k++) addQuad(mesh, inner[0] + k, inner[0] + k + 1, inner[1] + k + 1, inner[1] + k)
}

/** Closes a ring of skin with a flat face; it keeps the paint of the ring. */
function addEnd(mesh: MeshDraft, ring: number, way: 1 | -1, kept: number): void {
  const at = (k: number) => placeOf(mesh, ring + k)
  const uvOf = (k: number) => [mesh.uv[2 * (ring + k)]!, mesh.uv[2 * (ring + k) + 1]!] as const
  const middle = middleOf(mesh, ring)
  for (let k = 0; k < STEPS_ROUND; k++) {
    const corners = [[middle, uvOf(k)], [at(k), uvOf(k)], [at(k + 1), uvOf(k + 1)]] as const
    const [a, b, c] = corners.map(([place, uv]) => addCorner(mesh, { at: place, normal: [way, 0, 0], uv, kept, own: 1 })) as [number, number, number] // three by the list
    mesh.index.push(a, ...(way > 0 ? [b, c] : [c, b]))
  }
}
