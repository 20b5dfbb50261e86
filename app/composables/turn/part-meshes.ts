import { BufferAttribute, BufferGeometry, GLSL3, Matrix3, Mesh, RawShaderMaterial, Vector2, Vector3, Vector4, type IUniform, type Texture } from 'three'
import { EYE_FRAGMENT, LIP_FRAGMENT, PAINT_FRAGMENT, PART_VERTEX, WIRE_FRAGMENT } from './part-shaders'
import { STRIPS_MOST } from './tent-source'
import type { TurnMesh } from '#shared/picture/turn/mesh'

export type Uniforms = Record<string, IUniform>

/** What all parts share: how they stand, and the light on them. */
export function sharedUniforms(none: Texture) {
  return {
    turn: { value: new Matrix3() }, pivot: { value: new Vector3() }, perMm: { value: new Vector3(1, 1, 1) }, nudge: { value: new Vector2() },
    lightFirst: { value: none }, lightSecond: { value: none }, lightSide: { value: 1 },
    cloth: { value: new Vector4() }, stripCount: { value: 0 }, tentGain: { value: 1 },
    stripPlaces: { value: Array.from({ length: STRIPS_MOST }, () => new Vector4()) },
    stripLights: { value: Array.from({ length: STRIPS_MOST }, () => new Vector2()) },
    mattShare: { value: 0 }, glossy: { value: 1 }, groups: { value: 0 }, white: { value: new Vector3(1, 1, 1) },
  }
}

/** Textures of a painted part: its form, its colour, and what its flakes mirror. */
export const PAINT_TEXTURES = ['base', 'near0', 'between0', 'far0', 'near1', 'between1', 'far1'] as const
export const FORM_TEXTURES = ['formPaint', 'formGloss'] as const

export type PartName = 'body' | 'fins' | 'eyes' | 'wire' | 'lip'

const FRAGMENTS: Readonly<Record<PartName, string>> = {
  body: PAINT_FRAGMENT, fins: PAINT_FRAGMENT, eyes: EYE_FRAGMENT, wire: WIRE_FRAGMENT, lip: LIP_FRAGMENT,
}

/** Parts of a blank, empty until a form comes. */
export function partMeshes(shared: ReturnType<typeof sharedUniforms>, none: Texture): Record<PartName, Mesh<BufferGeometry, RawShaderMaterial>> {
  const part = (name: PartName, own: Uniforms = {}) => {
    const material = new RawShaderMaterial({
      glslVersion: GLSL3, vertexShader: PART_VERTEX, fragmentShader: FRAGMENTS[name], uniforms: { ...shared, ...own },
      transparent: name === 'lip', premultipliedAlpha: true,
    })
    const mesh = new Mesh(new BufferGeometry(), material)
    // Corners are placed by the shader; where three.js takes them to be says nothing.
    mesh.frustumCulled = false
    mesh.visible = false
    return mesh
  }
  const sheets = (): Uniforms => Object.fromEntries([...PAINT_TEXTURES, ...FORM_TEXTURES].map(name => [name, { value: none }]))
  return {
    body: part('body', sheets()), fins: part('fins', sheets()), eyes: part('eyes', { eye: { value: none } }),
    wire: part('wire'), lip: part('lip', { edgeMm: { value: 0.3 } }),
  }
}

/** Gives a part its triangles. */
export function shapeMesh(mesh: Mesh<BufferGeometry, RawShaderMaterial>, { position, normal, uv, kept, own, index }: TurnMesh): void {
  mesh.geometry.dispose()
  const geometry = new BufferGeometry()
  geometry.setAttribute('position', new BufferAttribute(position, 3))
  geometry.setAttribute('normal', new BufferAttribute(normal, 3))
  geometry.setAttribute('uv', new BufferAttribute(uv, 2))
  geometry.setAttribute('kept', new BufferAttribute(kept, 1))
  geometry.setAttribute('own', new BufferAttribute(own, 1))
  geometry.setIndex(new BufferAttribute(index, 1))
  mesh.geometry = geometry
}
