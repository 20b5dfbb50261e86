import { assertBands } from './bands'
import { ENGINE_VERSION } from './engine-version'
import type { Flake } from './flake'
import { emissionPhotons, type Fluorescence, glowOf } from './fluorescence'
import type { PaintOptics } from './paint-optics'

/** A paint, and how many drops of it go into the cup (any unit of volume, as sprayed). */
export interface DropPart { optics: PaintOptics, drops: number }

/**
 * The paint that a cup of drops makes: absorption, scattering and flakes add up by volume.
 *
 * Good for films with films, a pearl tinted by a film paint, and a candy with a pearl. A reducer or clear only thins.
 *
 * @throws {RangeError} when no drops are given, a count is negative, or two different flakes are mixed
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

function mixedFlake(used: readonly DropPart[], total: number): Flake | undefined {
  const flaked = used.flatMap(({ optics, drops }) => optics.flake ? [{ flake: optics.flake, drops }] : [])
  const first = flaked[0]?.flake
  if (!first) return undefined
  if (flaked.some(({ flake }) => flake.oxide !== first.oxide || flake.thickness !== first.thickness)) {
    throw new RangeError('mix: two different pearls cannot share a cup; spray them as two coats')
  }
  const flakes = flaked.reduce((sum, { flake, drops }) => sum + flake.flakesPerPass * drops, 0)
  const mean = (read: (flake: Flake) => number) => flakes === 0
    ? read(first)
    : flaked.reduce((sum, { flake, drops }) => sum + read(flake) * flake.flakesPerPass * drops, 0) / flakes
  return { ...first, flakesPerPass: flakes / total, sigma: mean(flake => flake.sigma), edge: mean(flake => flake.edge) }
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
