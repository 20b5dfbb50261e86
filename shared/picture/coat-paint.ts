import { mixOptics, type DropPart } from '#shared/optics/mix-optics'
import type { PaintOptics } from '#shared/optics/paint-optics'
import type { Coat } from '#shared/scheme/coat'
import type { Materials } from '#shared/scheme/materials'

/**
 * What lies in the cup of a coat, as one paint; undefined when there is no paint in it.
 *
 * Flakes of different pearls in one cup are shown as the commonest of them.
 */
export function coatPaint(coat: Coat, materials: Materials): PaintOptics | undefined {
  const parts = coat.mix.parts.flatMap(({ paintId, drops }): DropPart[] => {
    const paint = materials.paints.find(each => each.id === paintId)
    return paint ? [{ optics: paint.optics, drops }] : []
  })
  const [first] = parts
  if (!first) return undefined
  return parts.length === 1 ? first.optics : mixOptics(withOneFlake(parts))
}

function withOneFlake(parts: readonly DropPart[]): DropPart[] {
  const flaked = parts.flatMap(({ optics, drops }) => optics.flake ? [{ flake: optics.flake, count: optics.flake.flakesPerPass * drops }] : [])
  if (flaked.length < 2) return [...parts]
  const { oxide, thickness } = flaked.reduce((most, each) => each.count > most.count ? each : most).flake
  return parts.map(({ optics, drops }) => ({
    optics: optics.flake ? { ...optics, flake: { ...optics.flake, oxide, thickness } } : optics,
    drops,
  }))
}

/** A clear coat: it lays no colour to speak of and turns a matt finish glossy. */
export function isClearCoat(coat: Coat, materials: Materials): boolean {
  return coat.mix.parts.length > 0 && coat.mix.parts.every(({ paintId }) => {
    return materials.paints.find(paint => paint.id === paintId)?.kind === 'clear'
  })
}
