import type { SchemeBody } from '#shared/scheme/body'
import type { Coat } from '#shared/scheme/coat'
import type { Mask } from '#shared/scheme/mask'
import { type Bracket, brackets, coatsOf } from '#shared/scheme/stack-order'

/** Height of an end of a bracket between two rows, as a share of a coat's row. */
export const END_SHARE = 0.25

/** A row beside the section, from the top down. `row` is its place in the stack, from the ground. */
export type FilmRow
  = | { is: 'coat', key: string, row: number, coat: Coat, number: number, /** Brackets it lies in. */ within: Bracket[], /** The bracket whose name stands beside it. */ names: Bracket[] }
    | { is: 'end', key: string, row: number, act: 'fit' | 'lift', mask: Mask, bracket: Bracket | undefined, /** Other brackets that pass it. */ within: Bracket[] }

/** The rows of a stack as they stand beside the section: the last coat first. */
export function filmRows(body: Pick<SchemeBody, 'stack' | 'masks'>): FilmRow[] {
  const spans = brackets(body)
  const total = coatsOf(body.stack).length
  let number = 0
  const rows = body.stack.map((item, row): FilmRow | null => {
    const around = spans.filter(span => span.from < row && row < span.to)
    if (item.act === 'coat') {
      number++
      const names = spans.filter(span => span.coatIds[Math.floor(span.coatIds.length / 2)] === item.coat.id)
      return { is: 'coat', key: item.coat.id, row, coat: item.coat, number: Math.min(number, total), within: around, names }
    }
    const mask = body.masks.find(each => each.id === item.maskId)
    return mask ? { is: 'end', key: `${item.act} ${item.maskId}`, row, act: item.act, mask, bracket: spans.find(span => span.mask.id === mask.id), within: around } : null
  })
  return rows.filter(row => row !== null).reverse()
}

/** Middle of every coat's row from the top, in heights of a row, and the height of all of them. */
export function rowMiddles(rows: readonly FilmRow[]): { middles: ReadonlyMap<string, number>, height: number } {
  const middles = new Map<string, number>()
  let height = 0
  for (const row of rows) {
    const tall = row.is === 'coat' ? 1 : END_SHARE
    if (row.is === 'coat') middles.set(row.coat.id, height + tall / 2)
    height += tall
  }
  return { middles, height }
}

/** What a coat is called where its name is missing: its paint. */
export function coatTitle(coat: Coat, paints: readonly { id: string, name: string }[]): string {
  if (coat.name !== '') return coat.name
  const first = coat.mix.parts[0]
  if (!first) return 'Empty cup'
  return paints.find(paint => paint.id === first.paintId)?.name ?? 'A paint that is gone'
}

/** What a mask is, beside its name: "2 mm", "cut", "tape". */
export function maskFigure({ form }: Mask): string {
  switch (form.kind) {
    case 'mesh': return `${form.pitch} mm`
    case 'stencil': return form.does === 'opens' ? 'cut' : 'shield'
    case 'tape': return 'tape'
  }
}
