import type { SchemeBody } from '#shared/scheme/body'
import { listWords } from '#shared/scheme/coat-words'
import { maskWord } from '#shared/scheme/stack-order'

/** A row of a stack at which something can be laid, in words. */
export interface LayingRow { value: number, label: string }

/** Where coats can be laid in a finish, from the top down: over each coat, with the masks that are on there, and after each lift. */
export function layingRows(body: Pick<SchemeBody, 'stack' | 'masks'>): LayingRow[] {
  const rows: LayingRow[] = [{ value: 0, label: 'on the ground' }]
  const on: string[] = []
  let number = 0
  body.stack.forEach((item, i) => {
    if (item.act === 'fit') {
      on.push(item.maskId)
      return
    }
    if (item.act === 'coat') number++
    else on.splice(0, on.length, ...on.filter(id => id !== item.maskId))
    const below = number === 0 ? 'on the ground' : `over coat ${number}`
    const lifted = item.act === 'lift' ? `, after ${maskWord(body.masks, item.maskId)} is lifted` : ''
    const under = on.length > 0 ? `, through ${listWords(on.map(id => maskWord(body.masks, id)))}` : ''
    rows.push({ value: i + 1, label: `${below}${lifted}${under}` })
  })
  return rows.reverse().map((row, i) => i === 0 && row.value > 0 ? { ...row, label: `on top, ${row.label}` } : row)
}
