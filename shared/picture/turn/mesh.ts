/**
 * Triangles of one part of a blank in the body frame, mm. Counter-clockwise seen from outside.
 * Triples and pairs lie one after the other.
 */
export interface TurnMesh {
  position: Float32Array
  /** Outward unit normals of the plain form; a sheet's normals, where there is a sheet, carry the carving. */
  normal: Float32Array
  /** Place on the part's sheet, 0-1 from its left and from its first row. */
  uv: Float32Array
  /** Light kept, 0-1: inner faces of joints are dark. */
  kept: Float32Array
  /** 1 where the mesh's own normal counts and not the sheet's: cut ends, rims. */
  own: Float32Array
  index: Uint32Array
}

/** A mesh while it is put together. */
export interface MeshDraft {
  position: number[]
  normal: number[]
  uv: number[]
  kept: number[]
  own: number[]
  index: number[]
}

/** One corner of a mesh. */
export interface Corner {
  at: readonly [number, number, number]
  normal: readonly [number, number, number]
  uv?: readonly [number, number]
  kept?: number
  own?: number
}

/** An empty mesh to add to. */
export function meshDraft(): MeshDraft {
  return { position: [], normal: [], uv: [], kept: [], own: [], index: [] }
}

/** Adds a corner. @returns its number */
export function addCorner(mesh: MeshDraft, { at, normal, uv = [0, 0], kept = 1, own = 0 }: Corner): number {
  mesh.position.push(...at)
  mesh.normal.push(...normal)
  mesh.uv.push(...uv)
  mesh.kept.push(kept)
  mesh.own.push(own)
  return mesh.kept.length - 1
}

/** Adds the two triangles of a quad whose corners go round counter-clockwise. */
export function addQuad(mesh: MeshDraft, a: number, b: number, c: number, d: number): void {
  mesh.index.push(a, b, c, a, c, d)
}

/** A mesh as arrays that can be handed over. */
export function finishMesh(mesh: MeshDraft): TurnMesh {
  return {
    position: Float32Array.from(mesh.position), normal: Float32Array.from(mesh.normal), uv: Float32Array.from(mesh.uv),
    kept: Float32Array.from(mesh.kept), own: Float32Array.from(mesh.own), index: Uint32Array.from(mesh.index),
  }
}

/** Area of all triangles, mm²; of those whose corners keep all their light when `onlyLit`. */
export function meshArea({ position, index, kept }: TurnMesh, onlyLit = false): number {
  let sum = 0
  for (let i = 0; i < index.length; i += 3) {
    const [a, b, c] = [index[i]!, index[i + 1]!, index[i + 2]!]
    if (onlyLit && Math.min(kept[a]!, kept[b]!, kept[c]!) < 1) continue
    const [x, y, z] = crossOf(position, a, b, c)
    sum += Math.hypot(x, y, z) / 2
  }
  return sum
}

/** Volume a closed mesh holds, mm³; negative when it is inside out. */
export function meshVolume({ position, index }: TurnMesh): number {
  let sum = 0
  for (let i = 0; i < index.length; i += 3) {
    const a = index[i]!
    const [x, y, z] = crossOf(position, a, index[i + 1]!, index[i + 2]!)
    sum += (x * position[3 * a]! + y * position[3 * a + 1]! + z * position[3 * a + 2]!) / 6
  }
  return sum
}

function crossOf(p: Float32Array, a: number, b: number, c: number): [number, number, number] {
  const ux = p[3 * b]! - p[3 * a]!, uy = p[3 * b + 1]! - p[3 * a + 1]!, uz = p[3 * b + 2]! - p[3 * a + 2]!
  const vx = p[3 * c]! - p[3 * a]!, vy = p[3 * c + 1]! - p[3 * a + 1]!, vz = p[3 * c + 2]! - p[3 * a + 2]!
  return [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx]
}
