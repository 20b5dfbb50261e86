import { type AmountInputs, type CoatAmount, coatAmount } from './amounts/coat-amount'
import type { SchemeBody } from './body'
import type { AreaCells } from './coat-area'
import type { Materials } from './materials'
import { coatsOf } from './stack-order'

export { PLANNING_VALUES } from '#shared/quantities/planning-values'
export type { AmountInputs, CoatAmount }

/**
 * Paint, reducer and mix of every coat for a number of pieces, from the ground up; coats without a known paint are left out.
 * Estimates from planning values, each with its formula and inputs.
 * @throws {RangeError} when pieces is not a whole number of at least 1
 */
export function amounts(body: Pick<SchemeBody, 'stack'>, materials: Pick<Materials, 'paints'>, cells: AreaCells, plan: AmountInputs): CoatAmount[] {
  if (!Number.isInteger(plan.pieces) || plan.pieces < 1) throw new RangeError(`amounts: pieces must be a whole number of at least 1, got ${plan.pieces}`)
  return coatsOf(body.stack).flatMap((coat, i) => coatAmount(coat, i + 1, materials, cells, plan) ?? [])
}

/** How much of each paint the whole scheme takes, mL as it comes from the bottle, in the order of first use. */
export function paintTotals(coats: readonly Pick<CoatAmount, 'paints'>[]): { paintId: string, ml: number }[] {
  const totals = new Map<string, number>()
  for (const { paintId, ml } of coats.flatMap(coat => coat.paints)) totals.set(paintId, (totals.get(paintId) ?? 0) + ml)
  return [...totals].map(([paintId, ml]) => ({ paintId, ml }))
}
