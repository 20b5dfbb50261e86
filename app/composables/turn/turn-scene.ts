import { Camera, LinearSRGBColorSpace, NoToneMapping, Scene, WebGLRenderer, type DataTexture, type Texture } from 'three'
import type { LightSheet } from '#shared/picture/turn/light-sheet'
import { turnMatrix, turnScale, type TurnAngles } from '#shared/picture/turn/turn-angles'
import type { FormedSheet, PaintedSheet, TurnPaint } from '#shared/picture/turn/turn-bench'
import type { TurnForm } from '#shared/picture/turn/turn-form'
import { FORM_TEXTURES, PAINT_TEXTURES, partMeshes, shapeMesh, sharedUniforms, type PartName } from './part-meshes'
import { screenPasses } from './screen-passes'
import { noTexture, sheetTexture } from './sheet-texture'

/** How a picture of a turned blank is drawn: pixels, and the grey it stands on. */
export interface TurnFrame { angles: TurnAngles, width: number, height: number, surround: number }

/** A blank that can be turned, on one canvas. It draws when it is asked to and never by itself. */
export interface TurnScene {
  setForm: (form: TurnForm) => void
  setFormSheets: (body: FormedSheet, fins: FormedSheet | undefined) => void
  /** Hands the colours over to the graphics card piece by piece, then shows them; false when newer ones came meanwhile. */
  setPaint: (paint: TurnPaint) => Promise<boolean>
  setLight: (light: LightSheet) => void
  /** Fulfilled when the graphics card has taken in how to draw. */
  prepared: Promise<unknown>
  /** True once there is a form, colours and light. */
  isReady: () => boolean
  /** One go of a picture: the first shows it, every further one makes its edges and its gloss finer. A hasty one has half as many pixels a side. */
  draw: (frame: TurnFrame, go: number, isHasty: boolean) => void
  /** False while the graphics card is still at the last go: another would only queue up behind it. */
  isDrawn: () => boolean
  dispose: () => void
}

/** Goes that make a picture as fine as it gets. */
export const GOES_MOST = 8
/** Room before and behind the blank that is drawn, in half lengths of it. */
const DEPTH = 1.6

/**
 * Sets up a blank on a canvas; undefined where there is no WebGL 2 that can hold linear light.
 *
 * @param breathe waits until the page has drawn a frame
 */
export function turnScene(canvas: HTMLCanvasElement, breathe: () => Promise<void>): TurnScene | undefined {
  const context = canvas.getContext('webgl2', { alpha: false, antialias: false, depth: false, stencil: false, powerPreference: 'low-power' })
  if (!context?.getExtension('EXT_color_buffer_float')) return undefined
  const renderer = new WebGLRenderer({ canvas, context })
  renderer.outputColorSpace = LinearSRGBColorSpace
  renderer.toneMapping = NoToneMapping
  // Where shaders cannot be compiled beside other work, the first picture waits for them.
  const compilesBeside = context.getExtension('KHR_parallel_shader_compile') !== null
  const none = noTexture()
  const shared = sharedUniforms(none)
  const parts = partMeshes(shared, none)
  const passes = screenPasses(renderer)
  const scene = new Scene().add(...Object.values(parts))
  const held = new Map<string, Texture>()
  let fence: WebGLSync | null = null
  let form: TurnForm | undefined
  let latestPaint = 0
  const has = { sheets: false, paint: false, light: false, eye: false }

  /** Puts a texture in its place; the one that was there is let go of. */
  function put(part: PartName | 'light', name: string, texture: DataTexture | undefined): void {
    const key = `${part} ${name}`
    held.get(key)?.dispose()
    if (texture) held.set(key, texture)
    else held.delete(key)
    const uniforms = part === 'light' ? shared : parts[part].material.uniforms
    ;(uniforms as Record<string, { value: unknown }>)[name]!.value = texture ?? none
  }

  function paintTextures({ width, height, paint }: PaintedSheet, goesRound: boolean): Map<string, DataTexture> {
    const textures = new Map([['base', sheetTexture(paint.base, width, height, { goesRound, shrinks: true, staysSharp: true })]])
    paint.flakes.forEach(({ rows }, group) => (['near', 'between', 'far'] as const).forEach((name, r) => {
      textures.set(`${name}${group}`, sheetTexture(rows[r]!, width, height, { goesRound, shrinks: true }))
    }))
    return textures
  }

  function showParts(): void {
    parts.body.visible = parts.wire.visible = form !== undefined
    parts.fins.visible = form?.fins !== undefined
    parts.lip.visible = form?.lip !== undefined
    parts.eyes.visible = form !== undefined && has.eye
  }

  return {
    setForm(next) {
      form = next
      for (const name of ['body', 'fins', 'eyes', 'wire', 'lip'] as const) {
        const mesh = next[name]
        if (mesh) shapeMesh(parts[name], mesh)
      }
      shared.pivot.value.set(...next.reach.pivot, 0)
      // Another blank's sheets do not fit.
      has.sheets = has.paint = false
      showParts()
    },
    setFormSheets(body, fins) {
      for (const [part, sheet] of [['body', body], ['fins', fins]] as const) {
        if (!sheet) continue
        const reading = { goesRound: part === 'body', shrinks: true }
        const [paint, gloss] = [sheet.form.paint, sheet.form.gloss].map(data => sheetTexture(data, sheet.width, sheet.height, reading))
        put(part, FORM_TEXTURES[0], paint)
        put(part, FORM_TEXTURES[1], gloss)
      }
      has.sheets = true
    },
    async setPaint(paint) {
      const own = ++latestPaint
      const made = { body: paintTextures(paint.body, true), fins: paint.fins ? paintTextures(paint.fins, false) : new Map<string, DataTexture>() }
      for (const texture of [...made.body.values(), ...made.fins.values()]) {
        renderer.initTexture(texture)
        await breathe()
        if (own === latestPaint) continue
        for (const each of [...made.body.values(), ...made.fins.values()]) each.dispose()
        return false
      }
      for (const part of ['body', 'fins'] as const) for (const name of PAINT_TEXTURES) put(part, name, made[part].get(name))
      put('eyes', 'eye', paint.eye && sheetTexture(paint.eye.light, paint.eye.width, paint.eye.height, { shrinks: true }))
      shared.groups.value = paint.sigmas.length
      shared.glossy.value = paint.isGlossy ? 1 : 0
      shared.mattShare.value = paint.mattShare
      shared.white.value.set(...paint.white)
      has.eye = paint.eye !== undefined
      has.paint = true
      showParts()
      return true
    },
    setLight({ side, first, second, rig, gain }) {
      put('light', 'lightFirst', sheetTexture(first, side, side))
      put('light', 'lightSecond', sheetTexture(second, Math.sqrt(second.length / 4), Math.sqrt(second.length / 4)))
      shared.lightSide.value = side
      shared.tentGain.value = gain
      shared.cloth.value.set(rig.overhead, rig.horizon, rig.floor, rig.hole)
      shared.stripCount.value = rig.strips.length
      rig.strips.forEach((strip, i) => {
        shared.stripPlaces.value[i]?.set(strip.elevation, strip.azimuth, strip.halfHeight, strip.halfWidth)
        shared.stripLights.value[i]?.set(strip.edge, strip.radiance)
      })
      has.light = true
    },
    prepared: compilesBeside ? renderer.compileAsync(scene, new Camera()) : Promise.resolve(),
    isReady: () => form !== undefined && has.sheets && has.paint && has.light,
    draw({ angles, width, height, surround }, go, isHasty) {
      if (!form) return
      if (canvas.width !== width || canvas.height !== height) renderer.setSize(width, height, false)
      const smaller = isHasty ? 2 : 1
      const scale = turnScale(form.reach, angles, width, height)
      shared.turn.value.set(...turnMatrix(angles))
      shared.perMm.value.set(2 * scale / width, 2 * scale / height, 1 / (DEPTH * form.reach.long))
      shared.nudge.value.set(2 * nudge(go, 2) / width, 2 * nudge(go, 3) / height)
      parts.lip.material.uniforms.edgeMm!.value = Math.max(0.9 / scale, 0.3)
      passes.resize(Math.ceil(width / smaller), Math.ceil(height / smaller))
      passes.add(scene, go === 0)
      passes.show(surround, width, height)
      if (fence) context.deleteSync(fence)
      fence = context.fenceSync(context.SYNC_GPU_COMMANDS_COMPLETE, 0)
      context.flush()
    },
    // A fence from before the context was lost says nothing, and holds nothing up.
    isDrawn: () => !fence || context.getSyncParameter(fence, context.SYNC_STATUS) !== context.UNSIGNALED,
    dispose() {
      latestPaint++
      for (const texture of [...held.values(), none]) texture.dispose()
      for (const mesh of Object.values(parts)) {
        mesh.geometry.dispose()
        mesh.material.dispose()
      }
      passes.dispose()
      renderer.dispose()
      renderer.forceContextLoss()
    },
  }
}

/** Where in its pixel a go looks, -½ to ½: the first in the middle, the others spread evenly (Halton's row). */
function nudge(go: number, base: 2 | 3): number {
  let [share, step, left] = [0, 1 / base, go]
  for (; left > 0; left = Math.floor(left / base), step /= base) share += step * (left % base)
  return go === 0 ? 0 : share - 0.5
}
