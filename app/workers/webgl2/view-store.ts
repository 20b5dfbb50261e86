import { PART_GAP } from '#shared/blank/view-sample-lists'
import { glossShare, type SampleForm } from '#shared/picture/paint-light'
import { layerShelf, type LayerShelf } from './layer-shelf'
import { putSamples, ROW, rowsOf, sampleTexture, type SampleFormat } from './sample-textures'

/** What the graphics processor holds of one view. */
export interface ViewStore {
  rows: number
  codes: LayerShelf<Uint8Array>
  /** Directions and grain of a form, handed over at its first use. */
  form: (form: SampleForm) => FormTextures
  /** The glow, handed over when it is another than last time. */
  glow: (light: Float32Array) => WebGLTexture
  /** Where the light is drawn, and room to read it into, four numbers for each sample. */
  target: WebGLFramebuffer
  readings: Float32Array
  /** Bytes held, about. */
  bytes: number
  free: () => void
}

/** The normals that paint is lit by, and those that the gloss follows. */
export interface FormTextures { directions: WebGLTexture, glosses: WebGLTexture }

/** Makes room for a view of so many samples. */
export function viewStore(gl: WebGL2RenderingContext, count: number): ViewStore {
  const FOUR: SampleFormat = { internal: gl.RGBA32F, format: gl.RGBA, type: gl.FLOAT, each: 4 }
  const THREE: SampleFormat = { internal: gl.RGB32F, format: gl.RGB, type: gl.FLOAT, each: 3 }
  const CODE: SampleFormat = { internal: gl.R8UI, format: gl.RED_INTEGER, type: gl.UNSIGNED_BYTE, each: 1 }
  const rows = rowsOf(count)
  const most = Number(gl.getParameter(gl.MAX_TEXTURE_SIZE))
  if (rows > most) throw new RangeError(`${count} samples are more than fit into the ${most} rows of a texture here`)

  const drawn = sampleTexture(gl, FOUR, rows)
  const target = gl.createFramebuffer()
  gl.bindFramebuffer(gl.FRAMEBUFFER, target)
  gl.framebufferTexture2D(gl.FRAMEBUFFER, gl.COLOR_ATTACHMENT0, gl.TEXTURE_2D, drawn, 0)

  const codes = layerShelf<Uint8Array>(gl, { format: CODE.internal, width: ROW, height: rows, fill: (item, layer) => putSamples(gl, CODE, item, layer) })
  const forms = new Map<SampleForm, FormTextures>()
  let glowing: { light: Float32Array, texture: WebGLTexture } | undefined

  return {
    rows, codes, target,
    readings: new Float32Array(4 * ROW * rows),
    // Drawn light and its readings, two textures of directions, the glow, and codes of some twenty coats.
    bytes: ROW * rows * (16 + 16 + 2 * 16 + 12 + 20),
    form(form) {
      const found = forms.get(form)
      if (found) return found
      const put = (values: Float32Array) => {
        const texture = sampleTexture(gl, FOUR, rows)
        putSamples(gl, FOUR, values)
        return texture
      }
      const made = { directions: put(directionsOf(form)), glosses: put(glossesOf(form)) }
      forms.set(form, made)
      return made
    },
    glow(light) {
      if (glowing?.light === light) return glowing.texture
      const texture = glowing?.texture ?? sampleTexture(gl, THREE, rows)
      gl.bindTexture(gl.TEXTURE_2D, texture)
      putSamples(gl, THREE, light)
      glowing = { light, texture }
      return texture
    },
    free() {
      codes.free()
      gl.deleteFramebuffer(target)
      for (const texture of [drawn, glowing?.texture ?? null, ...[...forms.values()].flatMap(({ directions, glosses }) => [directions, glosses])]) gl.deleteTexture(texture)
    },
  }
}

/** Normal across and up, light from all round, sparkle: four for each sample. */
function directionsOf({ samples: { count, occlusion }, normal, sparkle }: SampleForm): Float32Array {
  const out = new Float32Array(4 * count)
  for (let i = 0; i < count; i++) {
    out[4 * i] = normal[3 * i]!
    out[4 * i + 1] = normal[3 * i + 1]!
    out[4 * i + 2] = occlusion[i]!
    out[4 * i + 3] = sparkle[i]!
  }
  return out
}

/** Normal of the gloss and its share: four for each sample; the share is below zero in the gap of a joint. */
function glossesOf({ samples, glossNormal }: SampleForm): Float32Array {
  const out = new Float32Array(4 * samples.count)
  for (let i = 0; i < samples.count; i++) {
    out.set(glossNormal.subarray(3 * i, 3 * i + 3), 4 * i)
    out[4 * i + 3] = samples.part[i] === PART_GAP ? -1 : glossShare(samples, i)
  }
  return out
}
