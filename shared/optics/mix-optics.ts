import { assertBands } from './bands'
import { ENGINE_VERSION } from './engine-version'
import type { Flake } from './flake'
import type { Fluorescence, PaintOptics } from './paint-optics'

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

/** The strongest glow, weakened by its share of the cup: a rough rule, since the other parts also take its light. */
function mixedGlow(used: readonly DropPart[], total: number): Fluorescence | undefined {
  const glowing = used.flatMap(({ optics, drops }) => optics.fluorescent ? [{ glow: optics.fluorescent, drops }] : [])
  if (glowing.length === 0) return undefined
  const main = glowing.reduce((most, part) => part.drops > most.drops ? part : most)
  return { ...main.glow, quantumYield: main.glow.quantumYield * main.drops / total }
}
