import { PART_GAP } from '#shared/blank/view-sample-lists'
import type { Mirroring, SampleLight } from '#shared/picture/engine/sample-light'
import type { SampleForm } from '#shared/picture/paint-light'
import { layerShelf, type LayerShelf } from './layer-shelf'
import { putSamples, ROW, rowsOf, sampleTexture, type SampleFormat } from './sample-textures'

/** What the graphics processor holds of one view. */
export interface ViewStore {
  rows: number
  codes: LayerShelf<Uint8Array>
  mirrorings: LayerShelf<Mirroring>
  /** What a light does at every sample, handed over when it is another than last time. */
  lights: (light: SampleLight, form: SampleForm) => WebGLTexture
  /** Where the light is drawn, and room to read it into, four numbers for each sample. */
  target: WebGLFramebuffer
  readings: Float32Array
  /** Bytes held, about. */
  bytes: number
  free: () => void
}

/**
 * Makes room for a view of so many samples.
 *
 * @throws {RangeError} when a texture here does not take as many
 */
export function viewStore(gl: WebGL2RenderingContext, count: number): ViewStore {
  const FOUR: SampleFormat = { internal: gl.RGBA32F, format: gl.RGBA, type: gl.FLOAT, each: 4 }
  const TWO: SampleFormat = { internal: gl.RG32F, format: gl.RG, type: gl.FLOAT, each: 2 }
  const CODE: SampleFormat = { internal: gl.R8UI, format: gl.RED_INTEGER, type: gl.UNSIGNED_BYTE, each: 1 }
  const rows = rowsOf(count)
  const most = Number(gl.getParameter(gl.MAX_TEXTURE_SIZE))
  if (rows > most) throw new RangeError(`${count} samples are more than fit into the ${most} rows of a texture here`)

  const drawn = sampleTexture(gl, FOUR, rows)
  const target = gl.createFramebuffer()
  gl.bindFramebuffer(gl.FRAMEBUFFER, target)
  gl.framebufferTexture2D(gl.FRAMEBUFFER, gl.COLOR_ATTACHMENT0, gl.TEXTURE_2D, drawn, 0)

  const size = { width: ROW, height: rows }
  const codes = layerShelf<Uint8Array>(gl, { ...size, format: CODE.internal, least: 8, fill: (item, layer) => putSamples(gl, CODE, item, layer) })
  const mirrorings = layerShelf<Mirroring>(gl, { ...size, format: TWO.internal, least: 1, fill: (item, layer) => putSamples(gl, TWO, pairsOf(item), layer) })
  const lights = keptTexture(gl, FOUR, rows)

  return {
    rows, codes, mirrorings, target,
    readings: new Float32Array(4 * ROW * rows),
    // What is drawn, its readings, the light, two kinds of flakes, and codes of some twenty coats.
    bytes: ROW * rows * (16 + 16 + 16 + 2 * 8 + 20),
    lights: (light, form) => lights.of(light, () => fourOf(light, form)),
    free() {
      gl.deleteFramebuffer(target)
      gl.deleteTexture(drawn)
      for (const held of [codes, mirrorings, lights]) held.free()
    },
  }
}

/** A texture that holds what was made of the last source; made at its first use. */
function keptTexture(gl: WebGL2RenderingContext, format: SampleFormat, rows: number) {
  let texture: WebGLTexture | undefined
  let last: object | undefined
  return {
    of(source: object, values: () => Float32Array): WebGLTexture {
      texture ??= sampleTexture(gl, format, rows)
      if (source === last) return texture
      gl.bindTexture(gl.TEXTURE_2D, texture)
      putSamples(gl, format, values())
      last = source
      return texture
    },
    free: () => gl.deleteTexture(texture ?? null),
  }
}

/** Light on the paint, white added evenly, gloss, and 1 in the gap of a joint: four for each sample. */
function fourOf({ light, even, gloss }: SampleLight, { samples: { count, part } }: SampleForm): Float32Array {
  const out = new Float32Array(4 * count)
  for (let i = 0; i < count; i++) {
    out[4 * i] = light[i]!
    out[4 * i + 1] = even ? even[i]! : 0
    out[4 * i + 2] = gloss ? gloss[i]! : 0
    out[4 * i + 3] = part[i] === PART_GAP ? 1 : 0
  }
  return out
}

function pairsOf({ strength, place }: Mirroring): Float32Array {
  const out = new Float32Array(2 * strength.length)
  for (let i = 0; i < strength.length; i++) {
    out[2 * i] = strength[i]!
    out[2 * i + 1] = place[i]!
  }
  return out
}
