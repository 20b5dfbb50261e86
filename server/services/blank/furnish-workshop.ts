import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { blanks, masks } from '#server/db/tables'
import { BUILT_IN_BLANKS } from '#shared/blank/built-in-blanks'
import { STARTER_MASKS } from '#shared/scheme/starter-masks'

/** Gives a new workshop the built-in blanks and the starter masks. */
export async function furnishWorkshop(ctx: Ctx): Promise<void> {
  await inTransaction(ctx, async (tx) => {
    await tx.db.insert(blanks).values(BUILT_IN_BLANKS.map(shape => ({ workshopId: tx.workshopId, name: shape.label, shape, builtIn: true })))
    await tx.db.insert(masks).values(STARTER_MASKS.map(mask => ({ workshopId: tx.workshopId, name: mask.name, form: mask.form })))
  })
}
