import type { CoatAmount } from './coat-amount'
import { type Figure, given } from './figure'

/** What the paint of a scheme costs, in the workshop's currency. Reducer, blanks and hours are not in it. */
export interface Cost {
  total: Figure
  /** Of one piece. */
  perPiece: Figure
  byCoat: ReadonlyMap<string, Figure>
  /** Paints whose price is not noted: they count for nothing. */
  unpriced: string[]
}

function costOfCoat({ paints }: Pick<CoatAmount, 'paints'>, prices: ReadonlyMap<string, number>): Figure {
  const priced = paints.flatMap(({ paintId, ml }) => {
    const price = prices.get(paintId)
    return price === undefined ? [] : [{ ml, price }]
  })
  const digits = (k: number) => priced.length === 1 ? '' : [...String(k + 1)].map(digit => '₀₁₂₃₄₅₆₇₈₉'[Number(digit)]).join('')
  return {
    value: priced.reduce((sum, { ml, price }) => sum + ml * price, 0), quantity: 'money',
    formula: priced.map((_, k) => `B${digits(k)} · e${digits(k)}`).join(' + ') || 'no price noted',
    inputs: priced.flatMap(({ ml, price }, k) => [given(`B${digits(k)}`, 'paint', ml, 'volume'), given(`e${digits(k)}`, 'its price', price, 'price')]),
  }
}

/** Adds up what the paint of all coats costs. `prices` of one mL, by paint. */
export function costOf(coats: readonly Pick<CoatAmount, 'coatId' | 'paints'>[], pieces: number, prices: ReadonlyMap<string, number>): Cost {
  const byCoat = new Map(coats.map(coat => [coat.coatId, costOfCoat(coat, prices)]))
  const total = [...byCoat.values()].reduce((sum, { value }) => sum + value, 0)
  const unpriced = new Set(coats.flatMap(({ paints }) => paints.flatMap(({ paintId }) => prices.has(paintId) ? [] : [paintId])))
  return {
    total: { value: total, quantity: 'money', formula: 'sum of its coats', inputs: [given('n', 'coats', coats.length)] },
    perPiece: { value: total / pieces, quantity: 'money', formula: 'E / N', inputs: [given('E', 'paint for all pieces', total, 'money'), given('N', 'pieces', pieces)] },
    byCoat,
    unpriced: [...unpriced],
  }
}
