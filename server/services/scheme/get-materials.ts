import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import type { Materials } from '#shared/scheme/materials'
import { materialsToday } from './materials-today'
import { schemeInWorkshop } from './scheme-in-workshop'

/** What a scheme's draft can be made with today, on its own blank or on another one that is being tried. */
export async function getMaterials(ctx: Ctx, schemeId: string, blankId?: string): Promise<Materials> {
  assertMay(ctx, 'scheme:read')
  return inTransaction(ctx, async (tx) => {
    const { draft } = await schemeInWorkshop(tx, schemeId)
    return materialsToday(tx, { stack: draft.stack, blankId: blankId ?? draft.blankId })
  })
}
