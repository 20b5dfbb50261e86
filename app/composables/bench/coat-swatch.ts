import { coatPaint } from '#shared/picture/coat-paint'
import type { Look } from '#shared/picture/look'
import type { Coat } from '#shared/scheme/coat'
import { paintSwatches } from '#shared/shelf/paint-swatches'

/** How what is in the cup of a coat looks by itself, as a CSS colour; undefined when the cup is empty. */
export function coatSwatch(coat: Coat, look: Look): string | undefined {
  const paint = coatPaint(coat, look.materials)
  return paint && paintSwatches(paint).masstone
}

/** How one paint looks by itself, as a CSS colour. */
export function paintSwatch(paintId: string, look: Look): string | undefined {
  const paint = look.materials.paints.find(each => each.id === paintId)
  return paint && paintSwatches(paint.optics).masstone
}
