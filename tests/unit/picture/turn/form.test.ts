import { describe, expect, it } from 'vitest'
import { BUILT_IN_BLANKS, builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { bodyMesh } from '#shared/picture/turn/body-mesh'
import { eyeMesh } from '#shared/picture/turn/eye-mesh'
import { finMesh } from '#shared/picture/turn/fin-mesh'
import { finLayout } from '#shared/picture/turn/fin-sheet'
import { lipMesh, wireMesh } from '#shared/picture/turn/hardware-mesh'
import { meshArea, meshVolume, type TurnMesh } from '#shared/picture/turn/mesh'
import { signedArea } from '#shared/picture/turn/triangulate'

const blanks = BUILT_IN_BLANKS.map(shape => [shape.label, prepareBlank(shape)] as const)
const whole = blanks.map(([label, { shape }]) => [label, prepareBlank({ ...shape, joints: [] })] as const)

describe('the form that is turned', () => {
  it.each(whole)('%s has the area and the volume of its blank', (_, blank) => {
    const mesh = bodyMesh(blank)
    expect(meshArea(mesh) / blank.measures.area).toBeCloseTo(1, 2)
    expect(meshVolume(mesh) / blank.measures.volume).toBeCloseTo(1, 2)
  })

  it.each(blanks)('%s loses its gaps to its joints and gains what is rounded', (_, blank) => {
    const { joints } = blank.shape
    const skin = meshArea(bodyMesh(blank), true) / blank.measures.area
    // Where it is fattest a mm of length is more than its share of the skin.
    const share = (mm: number) => 1.6 * mm / blank.shape.length
    const gaps = joints.reduce((sum, joint) => sum + joint.gap, 0)
    // A quarter round is longer than the straight line it takes the place of.
    const rounding = joints.reduce((sum, joint) => sum + 2 * (Math.PI / 2 - 1) * joint.round, 0)
    expect(skin).toBeLessThan(1.001 + share(rounding))
    expect(skin).toBeGreaterThan(0.995 - share(gaps))
  })

  it.each(blanks)('%s turns every triangle of every part outward', (_, blank) => {
    const layout = finLayout(blank)
    const parts = [bodyMesh(blank), eyeMesh(blank), wireMesh(blank), layout && finMesh(blank, layout), blank.shape.lip && lipMesh(blank.shape.lip)]
    for (const mesh of parts) if (mesh) expect(turnedInward(mesh)).toBe(0)
  })

  it.each(blanks)('%s lies on its sheets and nowhere beside them', (_, blank) => {
    const layout = finLayout(blank)
    for (const mesh of [bodyMesh(blank), eyeMesh(blank), layout && finMesh(blank, layout)]) {
      if (!mesh) continue
      expect(Math.min(...mesh.uv)).toBeGreaterThanOrEqual(-1e-6)
      expect(Math.max(...mesh.uv)).toBeLessThanOrEqual(1 + 1e-6)
      expect(mesh.position.every(Number.isFinite)).toBe(true)
    }
  })

  it('has fins as large as their outlines, on both faces', () => {
    const blank = prepareBlank(builtInBlank('shad-80')!)
    const mesh = finMesh(blank, finLayout(blank)!)
    const outlines = blank.fins.reduce((sum, { xs, ys }) => sum + 2 * Math.abs(signedArea(xs, ys)), 0)
    expect(meshArea(faces(mesh)) / outlines).toBeCloseTo(1, 3)
  })
})

/** A mesh without its rims. */
function faces(mesh: TurnMesh): TurnMesh {
  const index = []
  for (let i = 0; i < mesh.index.length; i += 3) if (mesh.own[mesh.index[i]!] === 0) index.push(...mesh.index.subarray(i, i + 3))
  return { ...mesh, index: Uint32Array.from(index) }
}

/** Triangles that face against the normals of their corners. */
function turnedInward({ position, normal, index, kept }: TurnMesh): number {
  let count = 0
  for (let i = 0; i < index.length; i += 3) {
    const [a, b, c] = [index[i]!, index[i + 1]!, index[i + 2]!].map(k => [...position.subarray(3 * k, 3 * k + 3)]) as [number[], number[], number[]]
    const [u, v] = [b.map((value, k) => value - a[k]!), c.map((value, k) => value - a[k]!)] as [number[], number[]]
    const cross = [u[1]! * v[2]! - u[2]! * v[1]!, u[2]! * v[0]! - u[0]! * v[2]!, u[0]! * v[1]! - u[1]! * v[0]!]
    const size = Math.hypot(...cross)
    // The web in a joint is too thin to have an outside along its edge.
    if (size < 1e-7 || kept[index[i]!]! < 0.1) continue
    const mean = [0, 1, 2].map(k => [i, i + 1, i + 2].reduce((sum, at) => sum + normal[3 * index[at]! + k]!, 0))
    if (cross.reduce((sum, value, k) => sum + value * mean[k]!, 0) / size < -0.05) count++
  }
  return count
}
