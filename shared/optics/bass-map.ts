import type { Spectrum } from './bands'
import { BASS_CONES, type BassCatch, type BassVerdict, verdictOn } from './bass-eyes'
import type { Rgb } from './colorimetry'
import { fitPictureWeights } from './picture-weights'
import { type ExactSeen, exactSeen } from './seen-exact'
import type { SeenLight } from './seen-light'
import { perTen } from './to-picture-bands'
import type { SeenWish } from './seen-wish'
import { lightFrom, type Stack } from './stack'

/** How the two cones weigh light in a place, 36 bands each; a perfect white there gives 1 and 1. */
interface ConeRows { green: Float64Array, red: Float64Array }

/** A place of a piece, by a key of the caller's. */
export interface BassPlace { key: string, stack: Stack }

/** What the two cones make of two places side by side. */
export interface BassContrast extends BassVerdict { pair: readonly [string, string] }

/**
 * Which places that lie side by side a largemouth bass's two cones would tell apart, in the light and the water of a wish. A bass
 * is taken to be used to the light it lives in. Words stand in `bass-words.ts`.
 *
 * @param pairs keys of places that touch
 * @throws {RangeError} when a pair names a place that is not there
 */
export function bassMap(places: readonly BassPlace[], pairs: readonly (readonly [string, string])[], wish: SeenWish): BassContrast[] {
  const seen = exactSeen(wish)
  const catches = new Map(places.map(({ key, stack }) => [key, bassCatchOf(stack, seen)]))
  const of = (key: string): BassCatch => {
    const taken = catches.get(key)
    if (!taken) throw new RangeError(`bassMap: there is no place ${key}`)
    return taken
  }
  return pairs.map(pair => ({ pair, ...verdictOn(of(pair[0]), of(pair[1])) }))
}

/** What the two cones take of a stack, lit from 45° and seen straight on, with what it gives off. */
export function bassCatchOf(stack: Stack, seen: ExactSeen): BassCatch {
  return bassCatchIn(lightFrom(stack, seen), seen)
}

/** The same of light that leaves a stack, 36 bands each. */
export function bassCatchIn({ reflected, photons }: ReturnType<typeof lightFrom>, seen: ExactSeen): BassCatch {
  const sent = photons.map((value, i) => value + seen.photons[i]! * reflected[i]!)
  const { green, red } = coneRows(seen)
  return { green: dot(green, sent), red: dot(red, sent) }
}

/**
 * A picture of the two cones: red shows what the long-wave cone takes, blue what the middle-wave cone takes, green their mean, each
 * as a share of what it takes of a white. Greys stay grey, and two places of one colour in the picture are one to both cones.
 */
export function bassLight(wish: SeenWish): SeenLight {
  const seen = exactSeen(wish)
  const { green, red } = coneRows(seen)
  const rows = (weights: ConeRows) => fitPictureWeights({ x: weights.red, y: weights.red.map((value, i) => (value + weights.green[i]!) / 2), z: weights.green })
  const ofPhotons = { green, red }
  const ofFactor = { green: green.map((value, i) => value * seen.photons[i]!), red: red.map((value, i) => value * seen.photons[i]!) }
  return { key: seen.key, reflected: rows(ofFactor), photons: perTen(seen.photons), given: rows(ofPhotons), white: [1, 1, 1] satisfies Rgb, surface: seen.surface }
}

/** Weights of photons that leave the piece. */
function coneRows({ photons, path }: ExactSeen): ConeRows {
  const row = (cone: Readonly<Float64Array>) => {
    const taken = cone.map((share, i) => share * path[i]!)
    const white = dot(taken, photons)
    return taken.map(share => white > 0 ? share / white : 0)
  }
  return { green: row(BASS_CONES.green), red: row(BASS_CONES.red) }
}

function dot(a: Spectrum, b: Spectrum): number {
  let sum = 0
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!
  return sum
}
