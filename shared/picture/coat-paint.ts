import { mixOptics, type DropPart } from '#shared/optics/mix-optics'
import type { PaintOptics } from '#shared/optics/paint-optics'
import type { Coat } from '#shared/scheme/coat'
import type { Materials } from '#shared/scheme/materials'

/** What lies in the cup of a coat, as one paint; undefined when there is no paint in it. */
export function coatPaint(coat: Coat, materials: Materials): PaintOptics | undefined {
  const parts = coat.mix.parts.flatMap(({ paintId, drops }): DropPart[] => {
    const paint = materials.paints.find(each => each.id === paintId)
    return paint ? [{ optics: paint.optics, drops }] : []
  })
  const [first] = parts
  if (!first) return undefined
  return parts.length === 1 ? first.optics : mixOptics(parts)
}

/** A clear coat: it lays no colour to speak of and turns a matt finish glossy. */
export function isClearCoat(coat: Coat, materials: Materials): boolean {
  return coat.mix.parts.length > 0 && coat.mix.parts.every(({ paintId }) => {
    return materials.paints.find(paint => paint.id === paintId)?.kind === 'clear'
  })
}
