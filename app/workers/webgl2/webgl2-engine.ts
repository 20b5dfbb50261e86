import type { LightAsk, PictureEngine } from '#shared/picture/engine/picture-engine'
import { sampleLightKeep } from '#shared/picture/engine/sample-light'
import type { ViewKit } from '#shared/picture/view-kit'
import { coatShelves, type CoatShelves } from './coat-shelves'
import { stackProgram, type StackProgram } from './draw-stack'
import { openContext, rendererOf, type EngineCanvas } from './open-context'
import { ROW } from './sample-textures'
import { viewStore, type ViewStore } from './view-store'

/** The engine on the graphics processor. */
export interface Webgl2Engine extends PictureEngine {
  readonly name: 'webgl2'
  /** What the graphics processor calls itself. */
  readonly renderer: string
  /** Whether the machine has taken the graphics processor away, for now or for good: `light` throws as long as it has. */
  isLost: () => boolean
}

/** What views may take on the graphics processor, bytes; beyond it the one drawn longest ago is let go of. */
const VIEWS_BYTES = 256 * 2 ** 20

/** All that stands on the graphics processor; gone as a whole when it is taken away. */
interface Standing {
  /** For stacks without a coat that glows, and with one; compiled at the first use. */
  programs: { quiet?: StackProgram, glowing?: StackProgram }
  shelves: CoatShelves
  views: WeakMap<ViewKit, ViewStore>
  /** Stores by last use, the longest ago first. */
  stores: Set<ViewStore>
  /** Frees the store of a view that nobody holds any more. */
  gone: FinalizationRegistry<ViewStore>
}

/**
 * Light worked out on the graphics processor: the whole stack of every sample in one go, with its flakes, glow, finish and tone.
 * Codes, tables and what the tent does at every sample are worked out beside it and handed over once for as long as they stand.
 *
 * @param canvas     of this engine's own, on a page or in a thread
 * @param viewsBytes what views may take on the graphics processor
 * @returns undefined where there is no WebGL 2 that draws into 32-bit numbers
 */
export function webgl2Engine(canvas: EngineCanvas = new OffscreenCanvas(1, 1), viewsBytes: number = VIEWS_BYTES): Webgl2Engine | undefined {
  const gl = openContext(canvas)
  if (!gl) return undefined
  const samplesLit = sampleLightKeep()
  let standing: Standing | undefined

  const losing = (event: Event) => {
    // Without this the browser would never give it back.
    event.preventDefault()
    standing = undefined
  }
  canvas.addEventListener('webglcontextlost', losing)

  function standUp(context: WebGL2RenderingContext): Standing {
    context.getExtension('EXT_color_buffer_float')
    context.pixelStorei(context.UNPACK_ALIGNMENT, 1)
    const stores = new Set<ViewStore>()
    return {
      programs: {}, shelves: coatShelves(context), views: new WeakMap(), stores,
      gone: new FinalizationRegistry((store) => {
        if (stores.delete(store)) store.free()
      }),
    }
  }

  return {
    name: 'webgl2',
    renderer: rendererOf(gl),
    isLost: () => gl.isContextLost(),
    light(kit, ask) {
      assertThere(gl)
      try {
        standing ??= standUp(gl)
        const view = storeOf(gl, standing, kit, ask.form.samples.count)
        letGo(standing, viewsBytes)
        programFor(gl, standing, ask).draw({ view, shelves: standing.shelves, ask, sample: samplesLit(ask.form, ask.lighting) })
        return readLight(gl, view, ask.form.samples.count)
      }
      catch (error) {
        // A program that would not compile, or a texture that could not be made, may be only the first sign of the loss.
        assertThere(gl)
        throw error
      }
    },
    close() {
      canvas.removeEventListener('webglcontextlost', losing)
      if (standing) for (const held of [...standing.stores, ...Object.values(standing.shelves), ...Object.values(standing.programs)]) held.free()
      standing = undefined
      gl.getExtension('WEBGL_lose_context')?.loseContext()
    },
  }
}

function assertThere(gl: WebGL2RenderingContext): void {
  if (gl.isContextLost()) throw new Error('the graphics processor was taken away')
}

function programFor(gl: WebGL2RenderingContext, { programs }: Standing, { coats }: LightAsk): StackProgram {
  return coats.some(({ table }) => table.glow) ? programs.glowing ??= stackProgram(gl, true) : programs.quiet ??= stackProgram(gl, false)
}

/** The store of a view, made at its first use. */
function storeOf(gl: WebGL2RenderingContext, { views, stores, gone }: Standing, kit: ViewKit, count: number): ViewStore {
  const kept = views.get(kit)
  const store = kept && stores.has(kept) ? kept : viewStore(gl, count)
  if (store !== kept) {
    views.set(kit, store)
    gone.register(kit, store)
  }
  // Put in anew, so that the first of the list is the one unused for longest.
  stores.delete(store)
  stores.add(store)
  return store
}

/** Frees the views drawn longest ago until the others fit; the last one always stays. */
function letGo({ stores }: Standing, most: number): void {
  let bytes = [...stores].reduce((sum, each) => sum + each.bytes, 0)
  for (const oldest of stores) {
    if (bytes <= most || stores.size === 1) return
    bytes -= oldest.bytes
    stores.delete(oldest)
    oldest.free()
  }
}

/** Waits for the drawing and fetches it: three numbers for each sample. */
function readLight(gl: WebGL2RenderingContext, { readings, rows }: ViewStore, count: number): Float32Array {
  gl.readPixels(0, 0, ROW, rows, gl.RGBA, gl.FLOAT, readings)
  const error = gl.getError()
  if (error !== gl.NO_ERROR) throw new Error(`the graphics processor gave up with ${error}`)
  assertThere(gl)
  const out = new Float32Array(3 * count)
  for (let i = 0, from = 0, to = 0; i < count; i++, from += 4, to += 3) {
    out[to] = readings[from]!
    out[to + 1] = readings[from + 1]!
    out[to + 2] = readings[from + 2]!
  }
  return out
}
