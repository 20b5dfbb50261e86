import { BANDS_36 } from './bands'
import { type Lab, labFromReflectance, lchFromLab } from './colorimetry'
import { type Flake, type Oxide, workOutFlake } from './flake'
import type { KnownMetallic, KnownPearl } from './paint-optics'

/** Chroma below which a wanted face colour is called silver. */
const SILVER_CHROMA = 10
/** Oxide of a silver pearl, and of an aluminium flake when not told, nm. */
const SILVER_THICKNESS = 50, ALUMINIUM_THICKNESS = 80
/** First order of interference: thicknesses that are searched, nm, for oxides of index near 2.5. */
const THINNEST = 58, THICKEST = 170

/**
 * Flakes from what is known of them.
 *
 * @throws {RangeError} when neither thickness nor a wanted colour is given, or a value is out of range
 */
export function flakeFromKnown(known: KnownPearl | KnownMetallic): Flake {
  const oxide: Oxide = known.how === 'metallic' ? 'aluminium' : known.oxide
  assertRange('flakes per pass', known.flakesPerPass, 0, 20)
  assertRange('the spread of tilt', known.sigma, 0.5, 45)
  assertRange('the edge share', known.edge, 0, 1)
  const { flakesPerPass, sigma, edge } = known
  const thickness = known.thickness ?? (known.how === 'metallic' ? ALUMINIUM_THICKNESS : thicknessForColour(known.wanted, known.oxide))
  assertRange('flake thickness', thickness, 1, 1000)
  return { oxide, thickness, flakesPerPass, sigma, edge }
}

/** L*, a*, b* of the light one flake sends straight back, D65. */
export function interferenceColour(oxide: Oxide, thickness: number): Lab {
  return labFromReflectance(workOutFlake(oxide, thickness, [1], BANDS_36).R)
}

/**
 * Oxide thickness, nm, whose face colour has the hue that is wanted: the painter picks the colour, the engine the thickness.
 * Greys ask for silver. Searches the first order, 58…170 nm, to the nearest half.
 *
 * @throws {RangeError} when no colour is given
 */
export function thicknessForColour(wanted: Lab | undefined, oxide: Exclude<Oxide, 'aluminium'>): number {
  if (!wanted) throw new RangeError('interference: give the oxide thickness or the colour that is wanted')
  const [, chroma, hue] = lchFromLab(wanted)
  if (chroma < SILVER_CHROMA) return SILVER_THICKNESS
  // Where two thicknesses share a hue the more colourful one is meant.
  const cost = (thickness: number) => {
    const [, faceChroma, faceHue] = lchFromLab(interferenceColour(oxide, thickness))
    return Math.abs((faceHue - hue + 540) % 360 - 180) + 200 / Math.max(faceChroma, 1)
  }
  const rough = cheapest(THINNEST, THICKEST, 3, cost)
  return cheapest(Math.max(THINNEST, rough - 3), Math.min(THICKEST, rough + 3), 0.5, cost)
}

function cheapest(from: number, to: number, step: number, cost: (thickness: number) => number): number {
  let best = from, least = Infinity
  for (let thickness = from; thickness <= to; thickness += step) {
    const here = cost(thickness)
    if (here < least) {
      least = here
      best = thickness
    }
  }
  return best
}

function assertRange(what: string, value: number, low: number, high: number): void {
  if (!(value >= low && value <= high)) throw new RangeError(`flake: ${what} must be from ${low} to ${high}, got ${value}`)
}
