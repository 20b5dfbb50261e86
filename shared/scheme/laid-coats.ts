import type { SchemeBody } from './body'
import type { Coat } from './coat'
import type { Mask } from './mask'

/** A coat as it is laid: its number from the ground up and the masks on the body while it is sprayed. */
export interface LaidCoat {
  coat: Coat
  /** 1 is the first coat on the ground. */
  number: number
  /** Masks fitted at that moment, in the order they were fitted. */
  masks: Mask[]
}

/**
 * The coats of a scheme from the ground up, each with the masks it is laid through. A mask fitted twice counts once;
 * lifting what is not fitted, and masks the scheme does not hold, change nothing.
 */
export function laidCoats(body: Pick<SchemeBody, 'stack' | 'masks'>): LaidCoat[] {
  const known = new Map(body.masks.map(mask => [mask.id, mask]))
  const fitted = new Map<string, Mask>()
  const laid: LaidCoat[] = []
  for (const item of body.stack) {
    switch (item.act) {
      case 'fit': {
        const mask = known.get(item.maskId)
        if (mask) fitted.set(mask.id, mask)
        break
      }
      case 'lift':
        fitted.delete(item.maskId)
        break
      case 'coat':
        laid.push({ coat: item.coat, number: laid.length + 1, masks: [...fitted.values()] })
        break
    }
  }
  return laid
}
