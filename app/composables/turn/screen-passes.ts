import {
  AddEquation, BufferAttribute, BufferGeometry, Camera, CustomBlending, GLSL3, HalfFloatType, LinearFilter, Mesh, NoBlending, OneFactor, RawShaderMaterial,
  RGBAFormat, Scene, Vector2, WebGLRenderTarget, type WebGLRenderer,
} from 'three'
import { ADD_FRAGMENT, SCREEN_FRAGMENT, WHOLE_VERTEX } from './screen-shaders'

/** Edges of one go have this many samples a pixel. */
const EDGE_SAMPLES = 4

/** Adds up goes of a picture, each nudged by a part of a pixel, and shows their mean. */
export interface ScreenPasses {
  /** Draws one go of a scene, as the first of a new picture or on top of the others. */
  add: (scene: Scene, isFirst: boolean) => void
  /** Shows the mean of all goes on a surround, a grey 0-255, over a canvas of some pixels. */
  show: (surround: number, width: number, height: number) => void
  resize: (width: number, height: number) => void
  dispose: () => void
}

/** Sets up the targets and passes of a renderer. */
export function screenPasses(renderer: WebGLRenderer): ScreenPasses {
  // Read smoothly, so that a hasty picture may be smaller than the canvas; at the same size every pixel reads its own.
  const target = (samples: number, depthBuffer: boolean) => new WebGLRenderTarget(1, 1, {
    type: HalfFloatType, format: RGBAFormat, samples, depthBuffer, minFilter: LinearFilter, magFilter: LinearFilter, generateMipmaps: false,
  })
  const one = target(EDGE_SAMPLES, true), sum = target(0, false)
  const camera = new Camera()
  const whole = new BufferGeometry()
  whole.setAttribute('position', new BufferAttribute(Float32Array.of(-1, -1, 0, 3, -1, 0, -1, 3, 0), 3))
  const adding = new RawShaderMaterial({
    glslVersion: GLSL3, vertexShader: WHOLE_VERTEX, fragmentShader: ADD_FRAGMENT, uniforms: { picture: { value: one.texture } }, depthTest: false, depthWrite: false,
    blending: CustomBlending, blendEquation: AddEquation, blendSrc: OneFactor, blendDst: OneFactor, blendSrcAlpha: OneFactor, blendDstAlpha: OneFactor,
  })
  const screen = new RawShaderMaterial({
    glslVersion: GLSL3, vertexShader: WHOLE_VERTEX, fragmentShader: SCREEN_FRAGMENT, depthTest: false, depthWrite: false, blending: NoBlending,
    uniforms: { picture: { value: sum.texture }, size: { value: new Vector2(1, 1) }, goes: { value: 1 }, surround: { value: 0 } },
  })
  const [addScene, screenScene] = [adding, screen].map((material) => {
    const mesh = new Mesh(whole, material)
    mesh.frustumCulled = false
    return new Scene().add(mesh)
  }) as [Scene, Scene] // two in the list
  let goes = 0
  renderer.autoClear = false

  return {
    add(scene, isFirst) {
      // Said every time: a renderer that got its context back has forgotten it.
      renderer.setClearColor(0, 0)
      renderer.setRenderTarget(one)
      renderer.clear()
      renderer.render(scene, camera)
      renderer.setRenderTarget(sum)
      if (isFirst) renderer.clear()
      goes = isFirst ? 1 : goes + 1
      renderer.render(addScene, camera)
    },
    show(surround, width, height) {
      screen.uniforms.size!.value.set(width, height)
      screen.uniforms.goes!.value = goes
      screen.uniforms.surround!.value = surround / 255
      renderer.setRenderTarget(null)
      renderer.render(screenScene, camera)
    },
    resize(width, height) {
      if (one.width === width && one.height === height) return
      one.setSize(width, height)
      sum.setSize(width, height)
    },
    dispose() {
      for (const each of [one, sum, adding, screen, whole]) each.dispose()
    },
  }
}
