import { prepareBlank, type PreparedBlank } from '#shared/blank/prepared-blank'
import type { ViewSamples } from '#shared/blank/view-sample-lists'
import { groundFromLab } from '#shared/optics/known-film'
import { seenKey, seenLight, type SeenLight, type SeenWish } from '#shared/optics/seen-light'
import { AIR_SURFACE, VEIL, WATER_SURFACE } from '#shared/optics/surface'
import { toPictureBands } from '#shared/optics/to-picture-bands'
import { canonicalJson } from '#shared/scheme/canonical'
import { coatTable, type CoatTable } from '../coat-table'
import { depositKeep, depositMap, type DepositKeep, type DepositMap } from '../deposit-map'
import { eyeColours } from '../eye-colours'
import { keepSome } from '../keep-some'
import { lightKey } from '../light-rig'
import { lightTables, type LightTables } from '../light-tables'
import type { Look } from '../look'
import { MATT_SHARE } from '../paint-light'
import type { PictureLight, PictureOptions } from '../picture-options'
import { eyesAreFitted, finishShown, shownCoats, type ShownCoat } from '../shown-coats'
import { sparkleNoise } from '../surface-grain'
import { bodySheet, bodySheetSize, type SheetSize } from './body-sheet'
import { eyeSheet } from './eye-sheet'
import { finLayout, finSheet } from './fin-sheet'
import { formSheet, type FormSheet } from './form-sheet'
import { lightSheet, type LightSheet } from './light-sheet'
import { paintSheet, type HalfSheet, type PaintSheet } from './paint-sheet'
import { turnForm, type TurnForm } from './turn-form'

/** What of a look is shown. */
export type TurnWish = Pick<PictureOptions, 'upTo' | 'clear' | 'seen'>

/** A sheet ready for a graphics card. */
export interface PaintedSheet extends SheetSize { paint: PaintSheet }
export interface FormedSheet extends SheetSize { form: FormSheet }

/** The coats of a look on the sheets of its blank, and how they end. */
export interface TurnPaint {
  body: PaintedSheet
  fins: PaintedSheet | undefined
  /** Undefined while the eyes are blind. */
  eye: SheetSize & { light: HalfSheet } | undefined
  /** Spreads of tilt of the flakes in it, degrees. */
  sigmas: readonly number[]
  isGlossy: boolean
  /** Share of the matt reflection when it is not. */
  mattShare: number
  /** What a perfect white looks like in the light it is seen by, linear sRGB. */
  white: readonly [number, number, number]
}

/** A body sheet never has more texels than this, whatever is asked for: graphics cards of phones hold it. */
export const TEXELS_MOST = 420_000
const KEPT = { blanks: 2, sheets: 2, maps: 64, tables: 240, lights: 6 }

interface SheetKit { samples: ViewSamples & SheetSize, keep: DepositKeep, sparkle: Float32Array, maps: (key: string, make: () => DepositMap) => DepositMap }
interface BlankKit { key: string, blank: PreparedBlank, layout: ReturnType<typeof finLayout> }

/** Lays looks on the sheets of their blanks and keeps what the next one can use. */
export interface TurnBench {
  /** Says all of a look's blank. */
  blankKey(look: Look): string
  form(look: Look): TurnForm
  /** Normals and shade of body and fins, at some texels to the mm. */
  sheets(look: Look, scale: number): { body: FormedSheet, fins: FormedSheet | undefined }
  /** The colours; hands over from time to time. */
  paint(look: Look, wish: TurnWish, scale: number): Generator<undefined, TurnPaint, undefined>
  /** A light on flakes of some spreads; water bends it less than air. */
  light(light: PictureLight, sigmas: readonly number[], seen: SeenWish): LightSheet
}

/** Puts up an empty bench. */
export function turnBench(): TurnBench {
  const blanks = keepSome<BlankKit>(KEPT.blanks)
  const kits = keepSome<{ body: SheetKit, fins: SheetKit | undefined }>(KEPT.sheets)
  const tables = keepSome<CoatTable>(KEPT.tables)
  const lights = keepSome<LightTables>(KEPT.lights), seens = keepSome<SeenLight>(KEPT.lights)

  function blankOf({ materials: { blank: { shape } } }: Look): BlankKit {
    const key = canonicalJson(shape)
    return blanks(key, () => {
      const blank = prepareBlank(shape)
      return { key, blank, layout: finLayout(blank) }
    })
  }

  function kitOf(look: Look, scale: number): { body: SheetKit, fins: SheetKit | undefined } {
    const { key, blank, layout } = blankOf(look)
    const fits = fittingScale(blank, scale)
    return kits(`${fits} ${key}`, () => ({
      body: sheetKit(bodySheet(blank, fits), blank),
      fins: layout && sheetKit(finSheet(blank, layout, fits), blank),
    }))
  }

  function* paintOn(kit: SheetKit, look: Look, seen: SeenLight, shown: readonly ShownCoat[]): Generator<undefined, PaintedSheet, undefined> {
    const coats = []
    for (const coat of shown) {
      const { codes, peak } = kit.maps(coat.placeKey, () => depositMap(kit.keep, coat.laid))
      const passes = coat.passes * peak
      coats.push({ codes, table: tables(canonicalJson([coat.paint, passes, ...coat.paint.flake ? [seen.surface.index] : []]), () => coatTable(coat.paint, passes, seen.surface)) })
      yield undefined
    }
    const { colour, finish } = look.body.ground
    const { width, height, count } = kit.samples
    const paint = yield* paintSheet(count, { coats, ground: toPictureBands(groundFromLab(colour, finish)), sparkle: kit.sparkle, seen })
    return { width, height, paint }
  }

  return {
    blankKey: look => blankOf(look).key,
    form(look) {
      const { blank, layout } = blankOf(look)
      return turnForm(blank, layout)
    },
    sheets(look, scale) {
      const { body, fins } = kitOf(look, scale)
      const formed = ({ samples }: SheetKit): FormedSheet => ({ width: samples.width, height: samples.height, form: formSheet(samples) })
      return { body: formed(body), fins: fins && formed(fins) }
    },
    * paint(look, wish, scale) {
      const shown = shownCoats(look, wish)
      const { body, fins } = kitOf(look, scale)
      yield undefined
      const seen = seens(seenKey(wish.seen), () => seenLight(wish.seen))
      const onBody = yield* paintOn(body, look, seen, shown)
      const onFins = fins && (yield* paintOn(fins, look, seen, shown))
      const finish = finishShown(look, wish)
      const { eyes } = look.body
      return {
        body: onBody, fins: onFins,
        eye: eyes && eyesAreFitted(look, wish.upTo) ? eyeSheet(eyeColours(eyes, wish.seen, seen), lights('bench', () => lightTables('bench'))) : undefined,
        sigmas: onBody.paint.flakes.map(({ sigma }) => sigma),
        isGlossy: finish === 'gloss', mattShare: seen.surface.veil * MATT_SHARE * VEIL[finish] / VEIL.matt, white: seen.white,
      }
    },
    light: (light, sigmas, { water }) => lightSheet(lights(lightKey(light), () => lightTables(light)), sigmas, water ? WATER_SURFACE.index : AIR_SURFACE.index),
  }
}

function sheetKit(samples: ViewSamples & SheetSize, blank: PreparedBlank): SheetKit {
  return { samples, keep: depositKeep(samples, blank), sparkle: sparkleNoise(samples), maps: keepSome<DepositMap>(KEPT.maps) }
}

/** The scale asked for, or as fine as the most texels allow. */
function fittingScale(blank: PreparedBlank, scale: number): number {
  const { width, height } = bodySheetSize(blank, scale)
  return scale * Math.min(1, Math.sqrt(TEXELS_MOST / (width * height)))
}
