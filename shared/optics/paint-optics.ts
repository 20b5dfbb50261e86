import type { Lab } from './colorimetry'
import { ENGINE_VERSION } from './engine-version'
import type { Flake, Oxide } from './flake'
import { type Fluorescence, glowAbsorption } from './fluorescence'
import { flakeFromKnown } from './known-flake'
import { filmFromDye, filmFromMasstone, filmFromTwoSwatches } from './known-film'
import type { Finish } from './surface'

export type { Fluorescence } from './fluorescence'
export { type DropPart, mixOptics } from './mix-optics'

/** How a paint came to be known; it decides how far its promises can be trusted. */
export type KnownHow = 'two-swatches' | 'masstone-hide' | 'dye-over-white' | 'interference' | 'metallic' | 'clear'

/** What the engine needs to know of a paint, for one pass of it as sprayed. Plain data: it is stored as it is. */
export interface PaintOptics {
  engineVersion: string
  bands: 36
  kind: 'film' | 'flake' | 'clear'
  /** Absorption per pass, 36 bands; of the binder alone when there are flakes. */
  K: number[]
  /** Scattering per pass, 36 bands. */
  S: number[]
  flake?: Flake
  fluorescent?: Fluorescence
  how: KnownHow
  /** True when no film has the colours given, and the nearest one misses them by more than 1 CIEDE2000. */
  clipped: boolean
}

/** One thin film over black and over white, both colours read under D65. The best way to know a paint. */
export interface KnownTwoSwatches {
  how: 'two-swatches'
  overBlack: Lab
  overWhite: Lab
  /** Bare grounds of the card, as read; usual card black and white when left out. */
  blackGround?: Lab
  whiteGround?: Lab
  /** Passes on the card, > 0; one or two are best. */
  passes: number
  /** Finish of the card's film when read; gloss (read off the highlight) when left out. */
  finish?: Finish
}

/** The colour of an opaque paint when thick, and the passes it takes to hide. */
export interface KnownMasstone { how: 'masstone-hide', masstone: Lab, passesToHide: number, finish?: Finish }

/** A true dye over white; `haze` is scattering per pass, 0 when left out. */
export interface KnownDye {
  how: 'dye-over-white'
  overWhite: Lab
  passes: number
  whiteGround?: Lab
  haze?: number
  finish?: Finish
  /** The dye also glows; `overWhite` is then what it would show without its glow. */
  fluorescent?: Omit<Fluorescence, 'Kf'>
}

/** A pearl: told by the thickness of its oxide, nm, or by the colour its face should have. */
export interface KnownPearl {
  how: 'interference'
  thickness?: number
  wanted?: Lab
  oxide: Exclude<Oxide, 'aluminium'>
  flakesPerPass: number
  sigma: number
  edge: number
  /** Colour of one pass of a dyed binder over white. */
  tint?: Lab
}

/** Aluminium flake; `thickness` in nm. */
export interface KnownMetallic { how: 'metallic', flakesPerPass: number, sigma: number, edge: number, thickness?: number, tint?: Lab }

/** A clear; `yellowing` is its absorption per pass at 400 nm, 0 for a water-white one. */
export interface KnownClear { how: 'clear', yellowing?: number }

/** Everything a person can know about a paint, by how they know it. */
export type PaintKnown = KnownTwoSwatches | KnownMasstone | KnownDye | KnownPearl | KnownMetallic | KnownClear

/**
 * Works out a paint's optics from what is known of it.
 *
 * @throws {RangeError} when a value is out of range; the message says which
 */
export function paintOpticsFrom(known: PaintKnown): PaintOptics {
  switch (known.how) {
    case 'two-swatches':
      return opticsOf('film', known.how, filmFromTwoSwatches(known))
    case 'masstone-hide':
      return opticsOf('film', known.how, filmFromMasstone(known))
    case 'dye-over-white':
      return withGlow(opticsOf('film', known.how, filmFromDye(known)), known.fluorescent)
    case 'interference':
    case 'metallic': {
      const binder = known.tint
        ? filmFromDye({ how: 'dye-over-white', overWhite: known.tint, passes: 1 })
        : { K: new Float64Array(36), S: new Float64Array(36), clipped: false }
      return { ...opticsOf('flake', known.how, binder), flake: flakeFromKnown(known) }
    }
    case 'clear':
      return opticsOf('clear', known.how, { K: yellowing(known.yellowing ?? 0), S: new Float64Array(36), clipped: false })
  }
}

/** A plain film from coefficients measured elsewhere; 36 bands each, per pass. */
export function filmOptics(K: ArrayLike<number>, S: ArrayLike<number>, how: KnownHow = 'two-swatches'): PaintOptics {
  return opticsOf('film', how, { K: Float64Array.from(K), S: Float64Array.from(S), clipped: false })
}

function opticsOf(kind: PaintOptics['kind'], how: KnownHow, { K, S, clipped }: { K: Float64Array, S: Float64Array, clipped: boolean }): PaintOptics {
  return { engineVersion: ENGINE_VERSION, bands: 36, kind, K: Array.from(K), S: Array.from(S), how, clipped }
}

function withGlow(dye: PaintOptics, glow: KnownDye['fluorescent']): PaintOptics {
  return glow ? { ...dye, fluorescent: { ...glow, Kf: glowAbsorption(dye.K, glow) } } : dye
}

/** Aged binder absorbs from the violet end, falling off exponentially: a slope of 0.014 per nm is our assumption. */
function yellowing(at400: number): Float64Array {
  if (!(at400 >= 0 && at400 <= 10)) throw new RangeError(`clear: yellowing must be from 0 to 10, got ${at400}`)
  return Float64Array.from({ length: 36 }, (_, i) => at400 * Math.exp(-0.014 * (380 + 10 * i - 400)))
}
