import { assertBands } from './bands'
import { ENGINE_VERSION, ONE_PEARL_VERSIONS } from './engine-version'
import type { Flake, FlakeKind } from './flake'
import { emissionPhotons, type Fluorescence, glowOf } from './fluorescence'
import type { PaintOptics } from './paint-optics'

/** A paint, and how many drops of it go into the cup (any unit of volume, as sprayed). */
export interface DropPart { optics: PaintOptics, drops: number }

/**
 * The paint that a cup of drops makes: absorption, scattering and flakes add up by volume.
 *
 * Films with films, a pearl in a candy, flake in clear, and pearls with pearls: each drop brings its own K, S and flakes and thins
 * the others'. A reducer or clear only thins.
 *
 * @throws {RangeError} when no drops are given, or a count is negative
 */
export function mixOptics(parts: readonly DropPart[]): PaintOptics {
  let total = 0
  for (const { optics, drops } of parts) {
    if (!(drops >= 0 && drops < Infinity)) throw new RangeError(`mix: drops must be at least 0, got ${drops}`)
    assertBands('mix', 36, optics.K, optics.S)
    total += drops
  }
  if (total === 0) throw new RangeError('mix: a cup needs at least one drop')

  const K = new Array<number>(36).fill(0), S = new Array<number>(36).fill(0)
  for (const { optics, drops } of parts) {
    for (let i = 0; i < 36; i++) {
      K[i]! += drops / total * optics.K[i]!
      S[i]! += drops / total * optics.S[i]!
    }
  }
  const used = parts.filter(part => part.drops > 0)
  const flake = mixedFlake(used, total)
  const fluorescent = mixedGlow(used, total)
  const main = mainPart(used)
  return {
    engineVersion: ENGINE_VERSION,
    bands: 36,
    kind: flake ? 'flake' : main.optics.kind === 'clear' ? 'clear' : 'film',
    K, S,
    ...(flake ? { flake } : {}),
    ...(fluorescent ? { fluorescent } : {}),
    how: main.optics.how,
    clipped: used.some(part => part.optics.clipped),
  }
}

/** The part there is most of, clears aside. */
function mainPart(used: readonly DropPart[]): DropPart {
  const coloured = used.filter(part => part.optics.kind !== 'clear')
  return (coloured.length > 0 ? coloured : used).reduce((most, part) => part.drops > most.drops ? part : most)
}

/**
 * The flakes of the cup: their numbers add up by volume. Their tilt and their edges are the mean by number, and every kind keeps
 * its own colour (`mean-flake.ts`), unless the paints are of a version that did not know how.
 */
function mixedFlake(used: readonly DropPart[], total: number): Flake | undefined {
  const flaked = used.flatMap(({ optics: { flake }, drops }) => flake ? [{ flake, count: flake.flakesPerPass * drops }] : [])
  const first = flaked[0]?.flake
  if (!first) return undefined
  const flakes = flaked.reduce((sum, { count }) => sum + count, 0)
  const mean = (read: (flake: Flake) => number) => flakes === 0
    ? read(first)
    : flaked.reduce((sum, { flake, count }) => sum + read(flake) * count, 0) / flakes
  const kinds = kindsOf(flaked, flakes)
  const main = kinds.reduce((most, kind) => kind.share > most.share ? kind : most, kinds[0] ?? { ...first, share: 1 })
  return {
    oxide: main.oxide, thickness: main.thickness, flakesPerPass: flakes / total,
    sigma: mean(flake => flake.sigma), edge: mean(flake => flake.edge),
    ...(kinds.length > 1 && !isOfOldLook(used) ? { kinds } : {}),
  }
}

/** A look frozen when a cup showed one pearl keeps that look. */
function isOfOldLook(used: readonly DropPart[]): boolean {
  return used.some(({ optics: { engineVersion, flake } }) => flake !== undefined && ONE_PEARL_VERSIONS.includes(engineVersion))
}

/** Every kind there are flakes of, once, and its share of their number. */
function kindsOf(flaked: readonly { flake: Flake, count: number }[], flakes: number): FlakeKind[] {
  const kinds = new Map<string, FlakeKind>()
  for (const { flake, count } of flaked) {
    if (count === 0) continue
    for (const { oxide, thickness, share } of flake.kinds ?? [{ ...flake, share: 1 }]) {
      const key = `${oxide} ${thickness}`
      const before = kinds.get(key)?.share ?? 0
      kinds.set(key, { oxide, thickness, share: before + share * count / flakes })
    }
  }
  return [...kinds.values()]
}

/**
 * One glow for the cup: what feeds it adds up by volume, and each dye lends its yield and its light by what it takes of a flat
 * white. With one glowing paint this is exact; with two, which of them a colour of light feeds is no longer told apart.
 */
function mixedGlow(used: readonly DropPart[], total: number): Fluorescence | undefined {
  const glowing = used.flatMap(({ optics, drops }) => {
    const glow = glowOf(optics)
    return glow ? [{ glow, share: drops / total, takes: drops / total * glow.Kf.reduce((sum, Kf) => sum + Kf, 0) }] : []
  })
  const takes = glowing.reduce((sum, part) => sum + part.takes, 0)
  if (!(takes > 0)) return undefined
  const main = glowing.reduce((most, part) => part.takes > most.takes ? part : most).glow
  const Kf = main.Kf.map((_, i) => glowing.reduce((sum, { glow, share }) => sum + share * glow.Kf[i]!, 0))
  if (glowing.length === 1) return { ...main, Kf }
  const quantumYield = glowing.reduce((sum, part) => sum + part.glow.quantumYield * part.takes, 0) / takes
  const bells = glowing.map(({ glow, takes }) => ({ bell: emissionPhotons(glow), photons: takes * glow.quantumYield }))
  const emission = Kf.map((_, i) => bells.reduce((sum, { bell, photons }) => sum + photons * bell[i]!, 0) / (takes * quantumYield))
  return { peak: main.peak, width: main.width, quantumYield, Kf, emission }
}
