import { asc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { masks } from '#server/db/tables'
import type { MaskView } from '#shared/scheme/mask-view'
import { maskView } from './blank-view'

/** Every mesh and stencil of the workshop, by name. */
export async function listMasks(ctx: Ctx): Promise<MaskView[]> {
  assertMay(ctx, 'mask:read')
  return inTransaction(ctx, async (tx) => {
    const rows = await tx.db.select().from(masks).where(eq(masks.workshopId, tx.workshopId)).orderBy(asc(masks.name), asc(masks.id))
    return rows.map(maskView)
  })
}
