import { type Lab, lchFromLab } from './colorimetry'
import { labFromReflectance } from './colorimetry'
import { type Flake, type Oxide, singleFlake } from './flake'
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
  return labFromReflectance(singleFlake(oxide, thickness, [1], 'exact36').R)
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
  let best = SILVER_THICKNESS, nearest = Infinity
  for (let thickness = THINNEST; thickness <= THICKEST; thickness += 0.5) {
    const [, faceChroma, faceHue] = lchFromLab(interferenceColour(oxide, thickness))
    const apart = Math.abs((faceHue - hue + 540) % 360 - 180)
    // Where two thicknesses share a hue the more colourful one is meant.
    const cost = apart + 200 / Math.max(faceChroma, 1)
    if (cost < nearest) {
      nearest = cost
      best = thickness
    }
  }
  return best
}

function assertRange(what: string, value: number, low: number, high: number): void {
  if (!(value >= low && value <= high)) throw new RangeError(`flake: ${what} must be from ${low} to ${high}, got ${value}`)
}
