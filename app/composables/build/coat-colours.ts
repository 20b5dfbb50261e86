import { coatPaint } from '#shared/picture/coat-paint'
import type { Look } from '#shared/picture/look'
import { coatsOf } from '#shared/scheme/stack-order'
import { ownColour } from '#shared/shelf/paint-swatches'
import type { PaintListItem } from '#shared/shelf/paint-view'

type Known = Pick<PaintListItem, 'id' | 'opticsId' | 'swatches'>

/** Own colours of mixes that were worked out before; the same drops of the same paints look the same. */
const mixed = new Map<string, string>()
const MIXED_MOST = 400

/** Each coat's own colour by its id, for the section and swatches; coats with an empty cup have none. */
export function coatColours(look: Look, shelf: readonly Known[]): Map<string, string> {
  const colours = new Map<string, string>()
  for (const coat of coatsOf(look.body.stack)) {
    const [first] = coat.mix.parts
    if (!first) continue
    const snapshot = look.materials.paints.find(paint => paint.id === first.paintId)
    const known = shelf.find(paint => paint.id === first.paintId && paint.opticsId === snapshot?.opticsId)
    const colour = coat.mix.parts.length === 1 && known ? known.swatches.masstone : mixColour(coat, look)
    if (colour) colours.set(coat.id, colour)
  }
  return colours
}

function mixColour(coat: Parameters<typeof coatPaint>[0], look: Look): string | undefined {
  const key = coat.mix.parts.map(part => `${look.materials.paints.find(paint => paint.id === part.paintId)?.opticsId} ${part.drops}`).join(' ')
  const before = mixed.get(key)
  if (before) return before
  const optics = coatPaint(coat, look.materials)
  if (!optics) return undefined
  const colour = ownColour(optics).hex
  if (mixed.size >= MIXED_MOST) mixed.clear()
  mixed.set(key, colour)
  return colour
}
