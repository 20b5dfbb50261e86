import type { PaintOptics } from '#shared/optics/paint-optics'
import type { Finish } from '#shared/optics/surface'
import { canonicalJson } from '#shared/scheme/canonical'
import { laidCoats, type LaidCoat } from '#shared/scheme/laid-coats'
import { effectivePasses } from '#shared/scheme/pass-strength'
import { coatPaint, isClearCoat } from './coat-paint'
import type { Look } from './look'
import type { PictureOptions } from './picture-options'

/** A coat that a picture shows: where it lies, of what, and how much. */
export interface ShownCoat {
  laid: LaidCoat
  paint: PaintOptics
  /** Passes of the paint as usually reduced. */
  passes: number
  /** Says everything that decides where the coat lies: nothing about its paint or its passes. */
  placeKey: string
}

/** The coats a picture shows, from the ground up. A coat with nothing in its cup shows nothing. */
export function shownCoats({ body, materials }: Look, { upTo, clear }: Pick<PictureOptions, 'upTo' | 'clear'>): ShownCoat[] {
  return laidUpTo(body, upTo).flatMap((laid) => {
    const { coat, masks } = laid
    if (!clear && isClearCoat(coat, materials)) return []
    const paint = coatPaint(coat, materials)
    if (!paint) return []
    const { id, tool, gun, where, marks } = coat
    return [{ laid, paint, passes: effectivePasses(coat, materials), placeKey: canonicalJson({ id, tool, gun, where, marks, masks }) }]
  })
}

function laidUpTo(body: Look['body'], upTo: PictureOptions['upTo']): LaidCoat[] {
  if (upTo === 'ground') return []
  const laid = laidCoats(body)
  if (upTo === 'all') return laid
  return laid.slice(0, laid.findIndex(({ coat }) => coat.id === upTo) + 1)
}

/** Eyes are fitted when the colour is done, before the clear. */
export function eyesAreFitted({ body, materials }: Look, upTo: PictureOptions['upTo']): boolean {
  if (!body.eyes || upTo === 'ground') return false
  const colours = laidCoats(body).filter(({ coat }) => !isClearCoat(coat, materials))
  const shown = laidUpTo(body, upTo)
  return shown.length > 0 && colours.every(({ coat }) => shown.some(other => other.coat.id === coat.id))
}

/** How the surface ends: glossy under a clear, matt as coats dry, and the ground as it came. */
export function finishShown(look: Look, options: Pick<PictureOptions, 'upTo' | 'clear'>): Finish {
  if (options.clear) return 'gloss'
  return shownCoats(look, options).length > 0 ? 'matt' : look.body.ground.finish
}
