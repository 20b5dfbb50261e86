import { coatTitle } from './film-rows'
import type { SchemeBody, StackItem } from '#shared/scheme/body'
import { listWords } from '#shared/scheme/coat-words'
import { brackets, coatNumber, coatsOf } from '#shared/scheme/stack-order'

type Paints = readonly { id: string, name: string }[]

function nameOf(body: Pick<SchemeBody, 'masks'>, item: StackItem, paints: Paints): string {
  if (item.act === 'coat') return coatTitle(item.coat, paints)
  const mask = body.masks.find(each => each.id === item.maskId)?.name ?? 'a mask'
  return item.act === 'fit' ? `where ${mask} is fitted` : `where ${mask} is lifted`
}

/** Where a carried row lies now, as a screen reader says it: "Above Smoke black, 9 of 13, inside the bars". */
export function carryWords(body: Pick<SchemeBody, 'stack' | 'masks'>, row: number, paints: Paints): string {
  const item = body.stack[row]
  if (!item) return ''
  const below = body.stack[row - 1]
  const where = below ? `Above ${nameOf(body, below, paints)}` : 'On the ground'
  if (item.act !== 'coat') {
    const span = brackets(body).find(each => each.mask.id === item.maskId)
    const count = span?.coatIds.length ?? 0
    return `${where}, round ${count === 1 ? '1 coat' : `${count} coats`}`
  }
  const inside = brackets(body).filter(span => span.from < row && row < span.to).map(span => span.mask.name)
  const place = `${coatNumber(body.stack, item.coat.id)} of ${coatsOf(body.stack).length}`
  return `${where}, ${place}${inside.length > 0 ? `, inside ${listWords(inside)}` : ''}`
}
