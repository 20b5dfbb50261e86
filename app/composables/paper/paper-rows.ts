import { brackets, coatsOf } from '#shared/scheme/stack-order'
import type { SchemeBody } from '#shared/scheme/body'
import type { Coat } from '#shared/scheme/coat'
import type { Mask } from '#shared/scheme/mask'

/** A line of the bench sheet, from the ground up: lay a coat, fit or lift a mask. */
export type PaperRow
  = | { is: 'coat', key: string, coat: Coat, number: number, /** Masks on the piece while it is laid. */ through: Mask[] }
    | { is: 'fit' | 'lift', key: string, mask: Mask, /** The coat below this line; null at the ground. */ after: string | null }

/** A scheme in the order of work. A mask that the scheme does not hold has no line. */
export function paperRows(body: Pick<SchemeBody, 'stack' | 'masks'>): PaperRow[] {
  const spans = brackets(body)
  const numbers = new Map(coatsOf(body.stack).map((coat, i) => [coat.id, i + 1]))
  let after: string | null = null
  return body.stack.flatMap((item, row): PaperRow[] => {
    if (item.act === 'coat') {
      after = item.coat.id
      const through = spans.filter(span => span.coatIds.includes(item.coat.id)).map(span => span.mask)
      return [{ is: 'coat', key: item.coat.id, coat: item.coat, number: numbers.get(item.coat.id) ?? 0, through }]
    }
    const mask = body.masks.find(each => each.id === item.maskId)
    return mask ? [{ is: item.act, key: `${item.act} ${row}`, mask, after }] : []
  })
}
