import type { LightAsk } from '#shared/picture/engine/picture-engine'
import type { SampleLight } from '#shared/picture/engine/sample-light'
import { BANDS } from '#shared/picture/level-table'
import { PICTURE_BAND_WIDTHS } from '#shared/optics/to-picture-bands'
import type { CoatShelves } from './coat-shelves'
import { makeProgram } from './make-program'
import { ROW } from './sample-textures'
import { stackBlock } from './stack-block'
import { GLOWING_MOST } from './glow-source'
import { fragmentSource, VERTEX_SOURCE } from './stack-source'
import type { ViewStore } from './view-store'

/** What one picture is drawn from. */
export interface Drawing {
  view: ViewStore
  shelves: CoatShelves
  ask: LightAsk
  sample: SampleLight
}

/** The program that works out the light of a stack, ready to run. */
export interface StackProgram {
  /** Draws the light of every sample of a view into its target. */
  draw: (drawing: Drawing) => void
  free: () => void
}

/** Texture units by the names of the program's textures. */
const UNITS = ['codes', 'films', 'flakes', 'mirrorings', 'glows', 'lights'] as const
const STACK_BINDING = 0

/**
 * Compiles the program.
 *
 * @param glows for stacks in which a coat glows, or for those without
 */
export function stackProgram(gl: WebGL2RenderingContext, glows: boolean): StackProgram {
  const { program, at } = makeProgram(gl, VERTEX_SOURCE, fragmentSource(glows))
  const stack = gl.createBuffer()
  gl.useProgram(program)
  UNITS.forEach((name, unit) => gl.uniform1i(at(name), unit))
  gl.uniformBlockBinding(program, gl.getUniformBlockIndex(program, 'Stack'), STACK_BINDING)
  // A vertex array of its own, empty: the triangle is made from its vertices' numbers.
  const none = gl.createVertexArray()

  return {
    draw({ view, shelves, ask, sample }) {
      handOver(view, shelves, ask, sample)
      setUniforms(ask, sample)
      gl.bindVertexArray(none)
      gl.bindFramebuffer(gl.FRAMEBUFFER, view.target)
      gl.viewport(0, 0, ROW, view.rows)
      gl.drawArrays(gl.TRIANGLES, 0, 3)
    },
    free() {
      gl.deleteBuffer(stack)
      gl.deleteVertexArray(none)
      gl.deleteProgram(program)
    },
  }

  /** Hands over what is not there yet, tells the program where everything lies, and binds it. */
  function handOver(view: ViewStore, { films, flakes, glows }: CoatShelves, { coats, form }: LightAsk, sample: SampleLight): void {
    // What hands textures over binds them to the unit that is active: one that the program does not read.
    gl.activeTexture(gl.TEXTURE0 + UNITS.length)
    const withFlakes = coats.flatMap(({ table: { flake } }) => flake ?? [])
    const glowing = coats.flatMap(({ table: { glow } }) => glow ?? [])
    if (glowing.length > GLOWING_MOST) throw new RangeError(`${glowing.length} coats that glow are more than ${GLOWING_MOST}`)
    const block = stackBlock(coats, {
      codes: view.codes.layersOf(coats.map(({ codes }) => codes)),
      films: films.layersOf(coats.map(({ table }) => table)),
      flakes: flakes.layersOf(withFlakes),
      mirrorings: view.mirrorings.layersOf(withFlakes.map(flake => sample.mirroring(flake))),
      glows: glows.layersOf(glowing),
    })
    const textures: Record<typeof UNITS[number], WebGLTexture> = {
      codes: view.codes.texture(), films: films.texture(), flakes: flakes.texture(), mirrorings: view.mirrorings.texture(),
      glows: glows.texture(), lights: view.lights(sample, form),
    }
    gl.bindBuffer(gl.UNIFORM_BUFFER, stack)
    gl.bufferData(gl.UNIFORM_BUFFER, block, gl.DYNAMIC_DRAW)
    gl.bindBufferBase(gl.UNIFORM_BUFFER, STACK_BINDING, stack)
    UNITS.forEach((name, unit) => {
      gl.activeTexture(gl.TEXTURE0 + unit)
      gl.bindTexture(name === 'lights' ? gl.TEXTURE_2D : gl.TEXTURE_2D_ARRAY, textures[name])
    })
  }

  function setUniforms({ coats, ground, lighting: { plain, seen } }: LightAsk, { gloss }: SampleLight): void {
    const lowest = (part: 'flake' | 'glow') => {
      const found = coats.findIndex(({ table }) => table[part])
      return found < 0 ? coats.length : found
    }
    const bands = (name: string, values: ArrayLike<number>, channel = 0) =>
      gl.uniformMatrix4fv(at(name), false, Float32Array.from({ length: BANDS }, (_, b) => values[BANDS * channel + b]!))
    gl.useProgram(program)
    gl.uniform1i(at('coatCount'), coats.length)
    gl.uniform1i(at('lowestFlakes'), lowest('flake'))
    gl.uniform1i(at('lowestGlow'), lowest('glow'))
    bands('ground', ground)
    for (const [channel, name] of ['red', 'green', 'blue'].entries()) bands(name, seen.reflected, channel)
    gl.uniform2f(at('surface'), seen.surface.outside, seen.surface.inside)
    gl.uniform3f(at('white'), ...seen.white)
    gl.uniform1i(at('isPlain'), Number(plain))
    gl.uniform1i(at('isGlossy'), Number(gloss !== undefined))
    if (!glows) return
    bands('photons', seen.photons)
    bands('widths', PICTURE_BAND_WIDTHS)
    for (const [channel, name] of ['givenRed', 'givenGreen', 'givenBlue'].entries()) bands(name, seen.given, channel)
  }
}
