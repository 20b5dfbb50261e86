import { VEIL } from '#shared/optics/surface'
import type { LightAsk } from '#shared/picture/engine/picture-engine'
import type { FlakeTable, LightTables, NormalTable } from '#shared/picture/light-tables'
import { MATT_SHARE } from '#shared/picture/paint-light'
import type { CoatShelves } from './coat-shelves'
import type { LayerShelf } from './layer-shelf'
import { makeProgram, type Program } from './make-program'
import { ROW } from './sample-textures'
import { stackBlock } from './stack-block'
import { FRAGMENT_SOURCE, VERTEX_SOURCE } from './stack-source'
import { STRIPS_MOST } from './tent-source'
import type { ViewStore } from './view-store'

/** The program that works out the light of a stack, ready to run. */
export interface StackProgram {
  /** Draws the light of every sample of a view into its target. */
  draw: (view: ViewStore, shelves: CoatShelves, ask: LightAsk, glow: Float32Array | undefined) => void
  free: () => void
}

/** Texture units by the names of the program's textures. */
const UNITS = ['codes', 'films', 'flakes', 'directions', 'glosses', 'glow', 'lobes'] as const
const STACK_BINDING = 0

/** Compiles the program. */
export function stackProgram(gl: WebGL2RenderingContext): StackProgram {
  const program = makeProgram(gl, VERTEX_SOURCE, FRAGMENT_SOURCE)
  const stack = gl.createBuffer()
  gl.useProgram(program.program)
  UNITS.forEach((name, unit) => gl.uniform1i(program.at(name), unit))
  gl.uniformBlockBinding(program.program, gl.getUniformBlockIndex(program.program, 'Stack'), STACK_BINDING)

  function bind(name: typeof UNITS[number], target: GLenum, texture: WebGLTexture | null): void {
    gl.activeTexture(gl.TEXTURE0 + UNITS.indexOf(name))
    gl.bindTexture(target, texture)
  }

  return {
    draw(view, shelves, ask, glow) {
      const { coats, form, ground, lighting: { tables, finish, plain, aspecular, seen: { reflected, surface } } } = ask
      const isGlossy = finish === 'gloss' && !plain
      const lobes = shelves.lobes(Math.sqrt(tables.irradiance.length))
      // What hands tables over binds them to the unit that is active.
      gl.activeTexture(gl.TEXTURE0 + UNITS.length)
      const layers = lobeLayers(lobes, ask, isGlossy)
      const flakes = coats.flatMap(({ table: { flake } }) => flake ?? [])
      const flakeLayers = shelves.flakes.layersOf(flakes)
      const block = stackBlock(coats, {
        codes: view.codes.layersOf(coats.map(({ codes }) => codes)),
        films: shelves.films.layersOf(coats.map(({ table }) => table)),
        flakes: coats.map(({ table: { flake } }) => flake ? flakeLayers[flakes.indexOf(flake)]! : -1),
        lobes: layers.flakes,
      }, aspecular)
      const { directions, glosses } = view.form(form)
      const glowing = glow ? view.glow(glow) : null

      gl.useProgram(program.program)
      gl.bindBuffer(gl.UNIFORM_BUFFER, stack)
      gl.bufferData(gl.UNIFORM_BUFFER, block, gl.DYNAMIC_DRAW)
      gl.bindBufferBase(gl.UNIFORM_BUFFER, STACK_BINDING, stack)
      bind('codes', gl.TEXTURE_2D_ARRAY, view.codes.texture())
      bind('films', gl.TEXTURE_2D_ARRAY, shelves.films.texture())
      bind('flakes', gl.TEXTURE_2D_ARRAY, shelves.flakes.texture())
      bind('lobes', gl.TEXTURE_2D_ARRAY, lobes.texture())
      bind('directions', gl.TEXTURE_2D, directions)
      bind('glosses', gl.TEXTURE_2D, glosses)
      bind('glow', gl.TEXTURE_2D, glowing)

      const lowest = coats.findIndex(({ table }) => table.flake)
      gl.uniform1i(program.at('coatCount'), coats.length)
      gl.uniform1i(program.at('lowestFlakes'), lowest < 0 ? coats.length : lowest)
      gl.uniformMatrix4fv(program.at('ground'), false, Float32Array.from(ground))
      for (const [channel, name] of (['red', 'green', 'blue'] as const).entries()) {
        gl.uniformMatrix4fv(program.at(name), false, Float32Array.from(reflected.subarray(16 * channel, 16 * channel + 16)))
      }
      gl.uniform2f(program.at('surface'), surface.outside, surface.inside)
      gl.uniform1i(program.at('isPlain'), Number(plain))
      gl.uniform1i(program.at('isGlossy'), Number(isGlossy))
      gl.uniform1i(program.at('hasGlow'), Number(glow !== undefined))
      gl.uniform1f(program.at('veil'), plain ? VEIL[finish] : 0)
      gl.uniform1i(program.at('irradianceLayer'), layers.irradiance)
      gl.uniform1i(program.at('mattLayer'), layers.matt)
      gl.uniform1f(program.at('mattShare'), MATT_SHARE * VEIL[finish] / VEIL.matt)
      setTent(gl, program, tables)

      gl.bindFramebuffer(gl.FRAMEBUFFER, view.target)
      gl.viewport(0, 0, ROW, view.rows)
      gl.drawArrays(gl.TRIANGLES, 0, 3)
    },
    free() {
      gl.deleteBuffer(stack)
      gl.deleteProgram(program.program)
    },
  }
}

/** Hands over the tables by normal that this picture reads. */
function lobeLayers(
  lobes: LayerShelf<NormalTable | FlakeTable>, { coats, lighting: { tables, plain } }: LightAsk, isGlossy: boolean,
): { irradiance: number, matt: number, flakes: number[] } {
  const matt = plain || isGlossy ? undefined : tables.matt()
  const flakes = coats.map(({ table: { flake } }) => flake && !plain ? tables.flakes(flake.sigma) : undefined)
  const wanted = [tables.irradiance, matt, ...flakes]
  const found = lobes.layersOf(wanted.flatMap(table => table ?? []))
  const [irradiance, mattLayer, ...flakeLayers] = wanted.map(table => table ? found.shift()! : -1)
  return { irradiance: irradiance!, matt: mattLayer!, flakes: flakeLayers }
}

/** The tent that the gloss mirrors. */
function setTent(gl: WebGL2RenderingContext, program: Program, { rig, gain }: LightTables): void {
  const { overhead, horizon, floor, hole, strips } = rig
  if (strips.length > STRIPS_MOST) throw new RangeError(`${strips.length} strips are more than ${STRIPS_MOST}`)
  gl.uniform4f(program.at('cloth'), overhead, horizon, floor, hole)
  gl.uniform1f(program.at('tentGain'), gain)
  gl.uniform1i(program.at('stripCount'), strips.length)
  if (strips.length === 0) return
  gl.uniform4fv(program.at('stripPlaces'), strips.flatMap(({ elevation, azimuth, halfHeight, halfWidth }) => [elevation, azimuth, halfHeight, halfWidth]))
  gl.uniform2fv(program.at('stripLights'), strips.flatMap(({ edge, radiance }) => [edge, radiance]))
}
