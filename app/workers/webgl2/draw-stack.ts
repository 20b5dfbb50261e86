import type { LightAsk } from '#shared/picture/engine/picture-engine'
import type { SampleLight } from '#shared/picture/engine/sample-light'
import type { CoatShelves } from './coat-shelves'
import { makeProgram } from './make-program'
import { ROW } from './sample-textures'
import { stackBlock } from './stack-block'
import { FRAGMENT_SOURCE, VERTEX_SOURCE } from './stack-source'
import type { ViewStore } from './view-store'

/** What one picture is drawn from. */
export interface Drawing {
  view: ViewStore
  shelves: CoatShelves
  ask: LightAsk
  sample: SampleLight
  glow: Float32Array | undefined
}

/** The program that works out the light of a stack, ready to run. */
export interface StackProgram {
  /** Draws the light of every sample of a view into its target. */
  draw: (drawing: Drawing) => void
  free: () => void
}

/** Texture units by the names of the program's textures. */
const UNITS = ['codes', 'films', 'flakes', 'mirrorings', 'lights', 'glow'] as const
const STACK_BINDING = 0

/** Compiles the program. */
export function stackProgram(gl: WebGL2RenderingContext): StackProgram {
  const { program, at } = makeProgram(gl, VERTEX_SOURCE, FRAGMENT_SOURCE)
  const stack = gl.createBuffer()
  gl.useProgram(program)
  UNITS.forEach((name, unit) => gl.uniform1i(at(name), unit))
  gl.uniformBlockBinding(program, gl.getUniformBlockIndex(program, 'Stack'), STACK_BINDING)
  // A vertex array of its own, empty: the triangle is made from its vertices' numbers.
  const none = gl.createVertexArray()

  return {
    draw({ view, shelves, ask, sample, glow }) {
      handOver(view, shelves, ask, sample, glow)
      setUniforms(ask, sample, glow)
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
  function handOver(view: ViewStore, { films, flakes }: CoatShelves, { coats, form }: LightAsk, sample: SampleLight, glow: Float32Array | undefined): void {
    // What hands textures over binds them to the unit that is active: one that the program does not read.
    gl.activeTexture(gl.TEXTURE0 + UNITS.length)
    const withFlakes = coats.flatMap(({ table: { flake } }) => flake ?? [])
    const block = stackBlock(coats, {
      codes: view.codes.layersOf(coats.map(({ codes }) => codes)),
      films: films.layersOf(coats.map(({ table }) => table)),
      flakes: flakes.layersOf(withFlakes),
      mirrorings: view.mirrorings.layersOf(withFlakes.map(flake => sample.mirroring(flake))),
    })
    const textures: Record<typeof UNITS[number], WebGLTexture | null> = {
      codes: view.codes.texture(), films: films.texture(), flakes: flakes.texture(), mirrorings: view.mirrorings.texture(),
      lights: view.lights(sample, form), glow: glow ? view.glow(glow) : null,
    }
    gl.bindBuffer(gl.UNIFORM_BUFFER, stack)
    gl.bufferData(gl.UNIFORM_BUFFER, block, gl.DYNAMIC_DRAW)
    gl.bindBufferBase(gl.UNIFORM_BUFFER, STACK_BINDING, stack)
    UNITS.forEach((name, unit) => {
      gl.activeTexture(gl.TEXTURE0 + unit)
      gl.bindTexture(name === 'lights' || name === 'glow' ? gl.TEXTURE_2D : gl.TEXTURE_2D_ARRAY, textures[name])
    })
  }

  function setUniforms({ coats, ground, lighting: { plain, seen: { reflected, surface, white } } }: LightAsk, { gloss }: SampleLight, glow: Float32Array | undefined): void {
    const lowest = coats.findIndex(({ table }) => table.flake)
    gl.useProgram(program)
    gl.uniform1i(at('coatCount'), coats.length)
    gl.uniform1i(at('lowestFlakes'), lowest < 0 ? coats.length : lowest)
    gl.uniformMatrix4fv(at('ground'), false, Float32Array.from(ground))
    for (const [channel, name] of ['red', 'green', 'blue'].entries()) {
      gl.uniformMatrix4fv(at(name), false, Float32Array.from(reflected.subarray(16 * channel, 16 * channel + 16)))
    }
    gl.uniform2f(at('surface'), surface.outside, surface.inside)
    gl.uniform3f(at('white'), ...white)
    gl.uniform1i(at('isPlain'), Number(plain))
    gl.uniform1i(at('isGlossy'), Number(gloss !== undefined))
    gl.uniform1i(at('hasGlow'), Number(glow !== undefined))
  }
}
