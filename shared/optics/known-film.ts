import { assertWithin } from './bands'
import { type Lab, labFromReflectance, xyzFromLab, xyzFromReflectance } from './colorimetry'
import { deltaE2000 } from './delta-e'
import { filmInto, filmLayer, layOver, overGround } from './film'
import type { KnownDye, KnownMasstone, KnownTwoSwatches } from './paint-optics'
import { ratioFromXyz, spectrumFromLab } from './spectrum-from-colour'
import { type Finish, internalFromMeasured, internalSpectrum, measuredFromInternal, measuredSpectrum } from './surface'
import { coefficientsFromTwoGrounds, type FoundCoefficients } from './two-grounds'

/** Bare black and white of a usual opacity card, as read. Common practice. */
export const CARD_BLACK: Lab = [10, 0, 0]
export const CARD_WHITE: Lab = [93, 0, 2]

/** Share of the light over white that a hiding film shows over black. @source ISO 6504-3, ASTM D2805 (from memory) */
export const HIDING_CONTRAST = 0.98
/** Luminance of the white ground that hiding is judged over, as measured. @source ISO 6504-3, ASTM D2805 (from memory) */
export const HIDING_WHITE = 0.80

/**
 * A film from its colours over black and over white: the colour over white becomes a spectrum, then the ratio of the two
 * colours does, so that the film over black is never lighter in any band.
 *
 * @throws {RangeError} when a lightness is not from 0 to 100, or passes is not above 0
 */
export function filmFromTwoSwatches(known: KnownTwoSwatches): FoundCoefficients {
  const finish = known.finish ?? 'gloss'
  assertLab('two swatches', known.overBlack)
  assertLab('two swatches', known.overWhite)
  assertPasses(known.passes)
  const overWhite = spectrumFromLab(known.overWhite)
  const ratio = ratioFromXyz(overWhite.reflectance, xyzFromLab(known.overBlack))
  const overBlack = overWhite.reflectance.map((value, i) => value * ratio.reflectance[i]!)

  const black = groundFromLab(known.blackGround ?? CARD_BLACK)
  const white = groundFromLab(known.whiteGround ?? CARD_WHITE)
  const { K, S } = coefficientsFromTwoGrounds({
    black, white, passes: known.passes,
    overBlack: internalSpectrum(overBlack, finish),
    overWhite: internalSpectrum(overWhite.reflectance, finish),
  })
  const missed = Math.max(
    missBy(K, S, known.passes, black, finish, known.overBlack),
    missBy(K, S, known.passes, white, finish, known.overWhite),
  )
  return { K, S, clipped: missed > BENT }
}

/** Difference, CIEDE2000, past which a film that gives back other colours than it was told of counts as bent. */
const BENT = 1

/** How far the film over its ground is from the colour it was told to have. */
function missBy(K: Float64Array, S: Float64Array, passes: number, ground: Float64Array, finish: Finish, wanted: Lab): number {
  const seen = measuredSpectrum(layOver(filmLayer(K, S, passes), ground), finish)
  return deltaE2000(labFromReflectance(seen), wanted)
}

/** True when a swatch hides so well that its strength is a guess: ask for a thinner one. */
export function hidesTooWell(overBlack: Lab, overWhite: Lab): boolean {
  return xyzFromLab(overBlack)[1] > HIDING_CONTRAST * xyzFromLab(overWhite)[1]
}

/**
 * A film from its masstone and the passes it takes to hide: scattering is taken to be the same in every band. Fair for
 * opaque paints; not fit for transparent ones.
 */
export function filmFromMasstone(known: KnownMasstone): FoundCoefficients {
  assertLab('masstone', known.masstone)
  assertPasses(known.passesToHide)
  const { reflectance, exact } = spectrumFromLab(known.masstone)
  const thick = internalSpectrum(reflectance, known.finish ?? 'gloss').map(R => Math.max(R, 1e-4))
  const shape = thick.map(R => (1 - R) ** 2 / (2 * R))

  let low = Math.log(1e-6), high = Math.log(1e6)
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2
    if (contrast(shape, Math.exp(middle)) < HIDING_CONTRAST) low = middle
    else high = middle
  }
  const strength = Math.exp((low + high) / 2) / known.passesToHide
  return { K: shape.map(ratio => ratio * strength), S: new Float64Array(36).fill(strength), clipped: !exact }
}

/** Luminance over black to luminance over white of a film of scattering `depth` and absorption `shape` × `depth`. */
function contrast(shape: Float64Array, depth: number): number {
  const ground = internalFromMeasured(HIDING_WHITE, 'gloss')
  const pair = new Float64Array(2)
  const overBlack = new Float64Array(36), overWhite = new Float64Array(36)
  for (let i = 0; i < 36; i++) {
    filmInto(shape[i]! * depth, depth, 1, pair)
    overBlack[i] = measuredFromInternal(pair[0]!, 'gloss')
    overWhite[i] = measuredFromInternal(overGround(pair[0]!, pair[1]!, ground), 'gloss')
  }
  return xyzFromReflectance(overBlack)[1] / xyzFromReflectance(overWhite)[1]
}

/** A dye from its colour over white: it only absorbs, but for a haze that is told beforehand. */
export function filmFromDye(known: KnownDye): FoundCoefficients {
  assertLab('dye', known.overWhite)
  assertPasses(known.passes)
  const haze = known.haze ?? 0
  if (!(haze >= 0 && haze <= 10)) throw new RangeError(`dye: haze must be from 0 to 10, got ${haze}`)
  const white = groundFromLab(known.whiteGround ?? CARD_WHITE)
  const finish = known.finish ?? 'gloss'
  const over = internalSpectrum(spectrumFromLab(known.overWhite).reflectance, finish)

  const K = over.map((Rw, i) => haze > 0
    ? absorptionBehindHaze(Rw, white[i]!, haze * known.passes) / known.passes
    : Math.max(0, Math.log(white[i]! / Math.max(Rw, 1e-6))) / 2 / known.passes)
  const S = new Float64Array(36).fill(haze)
  return { K, S, clipped: missBy(K, S, known.passes, white, finish, known.overWhite) > BENT }
}

/** Absorption of a hazy film that shows Rw over the ground; found by halving. */
function absorptionBehindHaze(Rw: number, ground: number, S: number): number {
  const pair = new Float64Array(2)
  let low = 0, high = 20
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2
    filmInto(middle, S, 1, pair)
    if (overGround(pair[0]!, pair[1]!, ground) > Rw) low = middle
    else high = middle
  }
  return low
}

/** The reflectance inside the film of a ground whose bare colour was read. */
export function groundFromLab(lab: Lab, finish: Finish = 'gloss'): Float64Array {
  assertLab('ground', lab)
  return internalSpectrum(spectrumFromLab(lab).reflectance, finish)
}

function assertLab(where: string, lab: Lab): void {
  if (lab.length !== 3) throw new RangeError(`${where}: a colour has three numbers, got ${lab.length}`)
  assertWithin(where, 'lightness', 0, 100, [lab[0]])
  assertWithin(where, 'a* and b*', -200, 200, [lab[1], lab[2]])
}

function assertPasses(passes: number): void {
  if (!(passes > 0 && passes <= 1000)) throw new RangeError(`passes must be above 0 and at most 1000, got ${passes}`)
}
