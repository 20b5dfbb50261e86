import { prepareBlank, type PreparedBlank } from '#shared/blank/prepared-blank'
import { projectPoint, type View } from '#shared/blank/view'
import { fitView, subpixelSamples, viewSamples } from '#shared/blank/view-samples'
import { groundFromLab } from '#shared/optics/known-film'
import { seenKey, seenLight, type SeenLight } from '#shared/optics/seen-light'
import { toPictureBands } from '#shared/optics/to-picture-bands'
import { canonicalJson } from '#shared/scheme/canonical'
import { canvasOf, copyCanvas, encodeCanvas, type Canvas } from './canvas'
import { coatTable, type CoatTable } from './coat-table'
import { drawHardware } from './draw-hardware'
import type { PictureEngine } from './engine/picture-engine'
import { plainEngine } from './engine/plain-engine'
import { eyeColours } from './eye-colours'
import { eyeLayer, layEyes, type EyeLayer } from './eye-layer'
import { keepSome } from './keep-some'
import { aspecularOf, lightKey } from './light-rig'
import { lightTables, type LightTables } from './light-tables'
import type { Look } from './look'
import type { Lighting } from './paint-light'
import { fullOptions } from './option-defaults'
import type { Picture, PictureLight, PictureOptions, PictureWish } from './picture-options'
import { pickPlace, type PickedPlace } from './pick-place'
import { FOUR_PLACES, jumpingPixels, NINE_PLACES, putRefined, shownPixels } from './refine'
import { eyesAreFitted, finishShown, shownCoats, type ShownCoat } from './shown-coats'
import { valueKeys } from './value-key'
import { keptMap, tidyMaps, viewKit, type KeyedCoat, type ViewKit } from './view-kit'

/** A coarse picture is this much smaller in each direction. */
export const COARSE = 4
/** Jumps worth four samples, in screen values of 0-1. */
const JUMP = { screen: 0.1, print: 0.035 }
/** Pictures up to this width take nine samples everywhere. */
const SMALL_WIDTH = 200
/** How many of each are kept by a bench at which one look is edited, and by one that paints a different look each time. */
const KEPT = {
  edits: { blanks: 4, views: 4, refinedViews: 2, tables: 120, lights: 8 },
  orders: { blanks: 12, views: 1, refinedViews: 0, tables: 120, lights: 4 },
}
/** White this dark is as good as none; whites this near to one another are the same. */
const DARKEST = 1e-4, SAME_WHITE = 1e-6
/** Share of the jumps of a picture that kept samples must hold to be used again: an edit of one coat moves few of them. */
const SAME_JUMPS = 0.9

/** Several samples for each of some pixels of a view. */
interface RefinedView { pixels: Uint32Array, kit: ViewKit }

/** How far a picture has come. */
export type PictureStage = 'coarse' | 'full' | 'refined'

/** A picture on its way. */
export interface StagedPicture { stage: PictureStage, picture: Picture }

/** Draws looks and keeps what a next picture can use: views, deposits, the coats below an edit, tables and lights. */
export interface PictureBench {
  /** One picture at the quality asked for. */
  draw(look: Look, wish: PictureWish): Picture
  /** The same picture, better and better: coarse, full, then with its edges refined. `from` full leaves the coarse one out. */
  stages(look: Look, wish: PictureWish, from?: 'coarse' | 'full'): Generator<StagedPicture, void, undefined>
  /** What lies at a place of the picture, pixels from the left and top; undefined beside the blank. */
  pick(look: Look, wish: PictureWish, x: number, y: number): PickedPlace | undefined
}

/**
 * Puts up an empty bench.
 *
 * @param work   for `edits` it keeps much, so that the next picture of the same look is quick; for `orders` little
 * @param engine what works out the light
 */
export function pictureBench(work: 'edits' | 'orders' = 'edits', engine: PictureEngine = plainEngine()): PictureBench {
  const most = KEPT[work]
  const blanks = keepSome<PreparedBlank>(most.blanks), lights = keepSome<LightTables>(most.lights)
  const eyeLayers = keepSome<EyeLayer>(most.views)
  const keyOf = valueKeys()
  let shown: { look: Look, upTo: string, clear: boolean, coats: ShownCoat[] } | undefined
  const views = keepSome<ViewKit>(most.views), refinedViews = keepSome<RefinedView>(most.refinedViews)
  const tables = keepSome<CoatTable>(most.tables), seens = keepSome<SeenLight>(most.lights)

  return {
    draw(look, wish) {
      shown = undefined
      const options = fullOptions(wish)
      if (options.quality === 'coarse') return finish(look, coarser(options), drawFull(look, coarser(options)))
      return finish(look, options, refine(look, options, drawFull(look, options)))
    },
    * stages(look, wish, from = 'coarse') {
      shown = undefined
      const options = fullOptions(wish)
      const isCoarse = options.quality === 'coarse'
      if (from === 'coarse' || isCoarse) yield { stage: 'coarse', picture: finish(look, coarser(options), drawFull(look, coarser(options))) }
      if (isCoarse) return
      const full = drawFull(look, options)
      yield { stage: 'full', picture: finish(look, options, full) }
      yield { stage: 'refined', picture: finish(look, options, refine(look, options, full)) }
    },
    pick(look, wish, x, y) {
      return pickPlace(kitOf(look, fullOptions(wish)).kit.samples, look.materials.blank.shape, x, y)
    },
  }

  function blankOf({ materials: { blank: { shape } } }: Look): { key: string, blank: PreparedBlank } {
    const key = keyOf(shape)
    return { key, blank: blanks(key, () => prepareBlank(shape)) }
  }

  function viewOf(blank: PreparedBlank, { width, height, roll, nose, mmPerPixel }: PictureOptions): View {
    return fitView(blank, { width, height, roll, nose, ...(mmPerPixel ? { scale: 1 / mmPerPixel } : {}) })
  }

  function kitOf(look: Look, options: PictureOptions): { kit: ViewKit, key: string, blank: PreparedBlank, view: View } {
    const { key: shapeKey, blank } = blankOf(look)
    const view = viewOf(blank, options)
    const key = `${canonicalJson(view)}${shapeKey}`
    return { key, blank, view, kit: views(key, () => viewKit(blank, view, viewSamples(blank, view))) }
  }

  function lightOf(light: PictureLight): LightTables {
    return lights(lightKey(light), () => lightTables(light))
  }

  /** The coats a picture shows: the stages of one picture ask again and again. */
  function shownOf(look: Look, { upTo, clear }: PictureOptions): ShownCoat[] {
    if (shown?.look !== look || shown.upTo !== upTo || shown.clear !== clear) shown = { look, upTo, clear, coats: shownCoats(look, { upTo, clear }) }
    return shown.coats
  }

  function seenBy({ seen }: PictureOptions): SeenLight {
    return seens(seenKey(seen), () => seenLight(seen))
  }

  /** Light of every sample of a kit. */
  function lit(kit: ViewKit, look: Look, options: PictureOptions): Float32Array {
    const seen = seenBy(options)
    const coats = shownOf(look, options).map((coat): KeyedCoat => {
      const { codes, peak } = keptMap(kit, coat)
      // Only of flakes is what their surface does in the table.
      const paintKey = `${coat.passes * peak} ${coat.paint.flake ? seen.surface.index : ''} ${keyOf(coat.paint)}`
      return { codes, key: `${coat.placeKey}${paintKey}`, table: tables(paintKey, () => coatTable(coat.paint, coat.passes * peak, seen.surface)) }
    })
    tidyMaps(kit, coats.length)
    const { colour, finish } = look.body.ground
    const ground = toPictureBands(groundFromLab(colour, finish))
    const groundKey = canonicalJson(look.body.ground)
    const lighting: Lighting = {
      tables: lightOf(options.light), finish: finishShown(look, options), plain: options.plain, aspecular: aspecularOf(options.light),
      seen,
    }
    const form = eyesAreFitted(look, options.upTo) ? kit.form : kit.blindForm
    return engine.light(kit, { groundKey, ground, coats, form, lighting })
  }

  function drawFull(look: Look, options: PictureOptions): Canvas {
    const { kit } = kitOf(look, options)
    return canvasOf(kit.samples, lit(kit, look, options))
  }

  function refine(look: Look, options: PictureOptions, canvas: Canvas): Canvas {
    const { key, blank, view } = kitOf(look, options)
    const isSmall = options.width <= SMALL_WIDTH
    const pixels = isSmall ? shownPixels(canvas) : jumpingPixels(canvas, options.quality === 'print' ? JUMP.print : JUMP.screen)
    if (pixels.length === 0) return canvas
    const places = isSmall ? NINE_PLACES : FOUR_PLACES
    const refined = refinedViews(
      `${places.length}${key}`,
      () => ({ pixels, kit: viewKit(blank, view, subpixelSamples(blank, view, pixels, places)) }),
      kept => shareHeld(kept.pixels, pixels) >= SAME_JUMPS,
    )
    putRefined(canvas, refined.pixels, refined.kit.samples, lit(refined.kit, look, options), places.length / 2)
    return canvas
  }

  /** Adds eyes, lip and wire, and encodes for the screen. */
  function finish(look: Look, options: PictureOptions, painted: Canvas): Picture {
    const { key, kit, view } = kitOf(look, options)
    const canvas = copyCanvas(painted)
    const { eyes } = look.body
    const seen = seenBy(options), { white } = seen
    // Eyes and wire are drawn as a white lamp shows them, so for as long everything is counted against the white there.
    tint(canvas, white.map(channel => 1 / Math.max(DARKEST, channel)))
    if (eyes && eyesAreFitted(look, options.upTo)) {
      const colours = eyeColours(eyes, options.seen, seen)
      const eyesKey = `${key} ${lightKey(options.light)} ${options.plain} ${canonicalJson(colours)}`
      layEyes(canvas, eyeLayers(eyesKey, () => eyeLayer(canvas, kit.parts.eyes, colours, lightOf(options.light), options.plain)))
    }
    drawHardware(canvas, kit.parts)
    tint(canvas, white.map(channel => Math.max(DARKEST, channel)))
    return {
      width: options.width, height: options.height, rgba: encodeCanvas(canvas, options), mmPerPixel: 1 / view.scale,
      origin: projectPoint(view, look.materials.blank.shape.length, 0, 0, 0),
    }
  }
}

/** Multiplies the light of a canvas, channel by channel. */
function tint({ light }: Canvas, by: readonly number[]): void {
  if (by.every(channel => Math.abs(channel - 1) < SAME_WHITE)) return
  for (let i = 0; i < light.length; i++) light[i]! *= by[i % 3]!
}

function coarser(options: PictureOptions): PictureOptions {
  return {
    ...options, quality: 'coarse',
    width: Math.ceil(options.width / COARSE), height: Math.ceil(options.height / COARSE),
    ...(options.mmPerPixel ? { mmPerPixel: options.mmPerPixel * COARSE } : {}),
  }
}

/** Share of `wanted` that `held` holds; both in rising order. */
function shareHeld(held: Uint32Array, wanted: Uint32Array): number {
  let found = 0, at = 0
  for (const pixel of wanted) {
    while (at < held.length && held[at]! < pixel) at++
    if (held[at] === pixel) found++
  }
  return found / wanted.length
}
