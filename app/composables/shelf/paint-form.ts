import type { Lab, PaintDraft, PaintKind, PaintBase, PaintKnown, TwoPart } from '#shared/shelf/paint'
import { colourTyped, readColour } from '#shared/shelf/read-colour'
import { twoPartFields, twoPartOfForm } from './two-part-form'

/** The ways of knowing as one chooses between them: a pearl and a metal flake are asked for different things. */
export const HOW_CHOICES = ['two-swatches', 'masstone-hide', 'dye-over-white', 'pearl', 'metallic', 'fluorescent', 'clear'] as const
export type HowChoice = typeof HOW_CHOICES[number]

/** A paint as it is being written: colours as typed, so that half a colour is no loss. */
export interface PaintForm {
  name: string
  kind: PaintKind
  base: PaintBase
  how: HowChoice
  overBlack: string
  overWhite: string
  blackGround: string
  whiteGround: string
  masstone: string
  passes: number
  passesToHide: number
  /** Scattering per pass of a dye. */
  haze: number
  oxide: 'anatase' | 'rutile' | 'hematite'
  pearlBy: 'colour' | 'thickness'
  wanted: string
  thickness: number
  flakesPerPass: number
  sigma: number
  /** Share of light that flake edges scatter, per cent. */
  edge: number
  isTinted: boolean
  tint: string
  tintPasses: number
  emissionPeak: number
  emissionWidth: number
  /** Photons out for each in, per cent. */
  yield: number
  yellowing: number
  reducerPer100: number
  filmPerPass: number
  volumeSolids: number
  density: number
  restMinutes: number
  sets: boolean
  potLifeMinutes: number
  isTwoPart: boolean
  ratioBy: TwoPart['by']
  resin: number
  hardener: number
  resinDensity: string
  hardenerDensity: string
  hazards: string[]
  note: string
  volumeLeft: number
  price: string
}

/** A form for a new paint. */
export function emptyPaintForm(): PaintForm {
  return {
    name: '', kind: 'opaque', base: 'water', how: 'two-swatches',
    overBlack: '', overWhite: '', blackGround: '', whiteGround: '', masstone: '', passes: 2, passesToHide: 4, haze: 0.01,
    oxide: 'anatase', pearlBy: 'colour', wanted: '', thickness: 60, flakesPerPass: 0.5, sigma: 9, edge: 6, isTinted: false, tint: '', tintPasses: 2,
    emissionPeak: 560, emissionWidth: 60, yield: 85, yellowing: 0,
    reducerPer100: 25, filmPerPass: 4, volumeSolids: 25, density: 1.05, restMinutes: 5, sets: false, potLifeMinutes: 30,
    isTwoPart: false, ratioBy: 'volume', resin: 2, hardener: 1, resinDensity: '', hardenerDensity: '',
    hazards: [], note: '', volumeLeft: 30, price: '',
  }
}

/** The way of knowing that fits most paints of a kind. */
export function usualHow(kind: PaintKind): HowChoice {
  switch (kind) {
    case 'pearl': case 'interference': return 'pearl'
    case 'metallic': return 'metallic'
    case 'fluorescent': return 'fluorescent'
    case 'clear': case 'sealer': return 'clear'
    case 'candy': case 'transparent': case 'primer': case 'opaque': case 'semi-opaque': return 'two-swatches'
  }
}

/** A form filled with a paint of the shelf. */
export function paintFormOf(paint: PaintDraft): PaintForm {
  const { name, kind, base, reducerPer100, filmPerPass, volumeSolids, density, restMinutes, note, volumeLeft } = paint
  return {
    ...emptyPaintForm(), ...knownFields(paint.known),
    name, kind, base, reducerPer100, filmPerPass, volumeSolids, density, restMinutes, note, volumeLeft,
    ...twoPartFields(paint.twoPart),
    sets: paint.potLifeMinutes !== undefined, potLifeMinutes: paint.potLifeMinutes ?? 30,
    hazards: [...paint.hazards], price: paint.pricePerMl === undefined ? '' : String(paint.pricePerMl),
  }
}

const typed = (lab: Lab | undefined) => lab ? colourTyped(lab) : ''

function knownFields(known: PaintKnown): Partial<PaintForm> {
  switch (known.how) {
    case 'two-swatches': return {
      how: known.how, overBlack: typed(known.overBlack), overWhite: typed(known.overWhite), passes: known.passes,
      blackGround: typed(known.blackGround), whiteGround: typed(known.whiteGround),
    }
    case 'masstone-hide': return { how: known.how, masstone: typed(known.masstone), passesToHide: known.passesToHide }
    case 'dye-over-white': return { how: known.how, overWhite: typed(known.overWhite), passes: known.passes, haze: known.haze }
    case 'flake': return {
      ...known.oxide === 'aluminium' ? { how: 'metallic' as const } : { how: 'pearl' as const, oxide: known.oxide },
      pearlBy: known.thickness === undefined ? 'colour' : 'thickness', wanted: typed(known.wanted), thickness: known.thickness ?? 60,
      flakesPerPass: known.flakesPerPass, sigma: known.sigma, edge: Number((known.edge * 100).toFixed(2)),
      isTinted: known.tint !== undefined, tint: typed(known.tint?.overWhite), tintPasses: known.tint?.passes ?? 2,
    }
    case 'fluorescent': return {
      how: known.how, overWhite: typed(known.overWhite), passes: known.passes, haze: known.haze,
      emissionPeak: known.emissionPeak, emissionWidth: known.emissionWidth, yield: Number((known.quantumYield * 100).toFixed(2)),
    }
    case 'clear': return { how: known.how, yellowing: known.yellowing }
  }
}

/** What is wrong with a form, by field; empty when nothing is. */
export type Wrong = Partial<Record<keyof PaintForm, string>>

/** Either what was meant, or what is wrong with it. */
export type Read<T> = { value: T, wrong?: undefined } | { value?: undefined, wrong: Wrong }

const NO_COLOUR = 'This is no colour yet. Type three figures, such as 52 24 38, or a CSS colour.'
const MISSING = 'Pick or type its colour.'

class Colours {
  wrong: Wrong = {}

  constructor(private readonly form: PaintForm) {}

  take(field: 'overBlack' | 'overWhite' | 'masstone' | 'wanted' | 'tint'): Lab {
    return this.maybe(field) ?? this.refuse(field, MISSING)
  }

  maybe(field: 'overBlack' | 'overWhite' | 'masstone' | 'wanted' | 'tint' | 'blackGround' | 'whiteGround'): Lab | undefined {
    if (this.form[field].trim() === '') return undefined
    return readColour(this.form[field]) ?? this.refuse(field, NO_COLOUR)
  }

  private refuse(field: keyof PaintForm, words: string): Lab {
    this.wrong[field] ??= words
    return [50, 0, 0]
  }
}

/** What a form says of the paint's colour. */
export function knownOfForm(form: PaintForm): Read<PaintKnown> {
  const colours = new Colours(form)
  const value = knownFrom(form, colours)
  return Object.keys(colours.wrong).length > 0 ? { wrong: colours.wrong } : { value }
}

function knownFrom(form: PaintForm, colours: Colours): PaintKnown {
  const { passes, haze } = form
  switch (form.how) {
    case 'two-swatches': {
      const [blackGround, whiteGround] = [colours.maybe('blackGround'), colours.maybe('whiteGround')]
      return {
        how: form.how, overBlack: colours.take('overBlack'), overWhite: colours.take('overWhite'), passes,
        ...blackGround && { blackGround }, ...whiteGround && { whiteGround },
      }
    }
    case 'masstone-hide': return { how: form.how, masstone: colours.take('masstone'), passesToHide: form.passesToHide }
    case 'dye-over-white': return { how: form.how, overWhite: colours.take('overWhite'), passes, haze }
    case 'pearl': return { ...flakeFrom(form, colours), oxide: form.oxide, ...form.pearlBy === 'colour' ? { wanted: colours.take('wanted') } : { thickness: form.thickness } }
    case 'metallic': return { ...flakeFrom(form, colours), oxide: 'aluminium' }
    case 'fluorescent': return {
      how: form.how, overWhite: colours.take('overWhite'), passes, haze,
      emissionPeak: form.emissionPeak, emissionWidth: form.emissionWidth, quantumYield: form.yield / 100,
    }
    case 'clear': return { how: form.how, yellowing: form.yellowing }
  }
}

function flakeFrom(form: PaintForm, colours: Colours) {
  return {
    how: 'flake' as const, flakesPerPass: form.flakesPerPass, sigma: form.sigma, edge: form.edge / 100,
    ...form.isTinted && { tint: { overWhite: colours.take('tint'), passes: form.tintPasses } },
  }
}

/** The whole paint a form says. */
export function draftOfForm(form: PaintForm): Read<PaintDraft> {
  const known = knownOfForm(form)
  const price = readPrice(form.price)
  const twoPart = twoPartOfForm(form)
  const wrong: Wrong = {
    ...known.wrong,
    ...twoPart.wrong,
    ...form.name.trim() === '' && { name: 'Give it the name that stands on its bottle.' },
    ...price === null && { price: 'A price is a figure, such as 0.21.' },
  }
  if (!known.value || price === null || Object.keys(wrong).length > 0) return { wrong }
  const { kind, base, reducerPer100, filmPerPass, volumeSolids, density, restMinutes, hazards, volumeLeft } = form
  return {
    value: {
      name: form.name.trim(), kind, base, known: known.value, reducerPer100, filmPerPass, volumeSolids, density, restMinutes, hazards, volumeLeft,
      note: form.note.trim(), potLifeMinutes: form.sets ? form.potLifeMinutes : undefined, twoPart: twoPart.value, pricePerMl: price,
    },
  }
}

function readPrice(written: string): number | undefined | null {
  if (written.trim() === '') return undefined
  const price = Number(written.trim().replace(',', '.'))
  return Number.isFinite(price) && price >= 0 && price <= 1000 ? price : null
}
