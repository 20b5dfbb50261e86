import type { SchemeBody } from './body'
import type { Materials } from './materials'
import { coatsOf } from './stack-order'

/** The paints a body uses, by id, in the order in which they are first laid. */
export function usedPaintIds(body: Pick<SchemeBody, 'stack'>): string[] {
  return [...new Set(coatsOf(body.stack).flatMap(coat => coat.mix.parts.map(part => part.paintId)))]
}

/** Only the materials a body uses: what a revision freezes. The order does not depend on the shelf. */
export function usedMaterials(body: Pick<SchemeBody, 'stack'>, materials: Materials): Materials {
  const paints = usedPaintIds(body).flatMap(id => materials.paints.find(paint => paint.id === id) ?? [])
  return { paints, blank: materials.blank }
}
