import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { masks } from '#server/db/tables'
import type { MaskChange, MaskDraft, MaskView } from '#shared/scheme/mask-view'
import { Problem } from '#shared/errors/problem'
import { maskView } from './blank-view'

/** Adds a mesh or stencil to the workshop's own. */
export async function addMask(ctx: Ctx, draft: MaskDraft): Promise<MaskView> {
  assertMay(ctx, 'mask:change')
  return inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.insert(masks).values({ workshopId: tx.workshopId, name: draft.name, form: draft.form }).returning()
    return maskView(row!)
  })
}

/** Changes a mask that is still at `version`. Schemes hold a copy of its form, so none of them changes. */
export async function changeMask(ctx: Ctx, maskId: string, version: number, change: MaskChange): Promise<MaskView> {
  assertMay(ctx, 'mask:change')
  return inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.select().from(masks)
      .where(and(eq(masks.id, maskId), eq(masks.workshopId, tx.workshopId))).for('update')
    if (!row) throw new Problem({ code: 'mask/not-found' })
    if (row.version !== version) throw new Problem({ code: 'mask/changed-meanwhile' })
    const [changed] = await tx.db.update(masks)
      .set({ name: change.name, form: change.form, retired: change.retired ?? row.retired, version: version + 1 })
      .where(and(eq(masks.id, maskId), eq(masks.workshopId, tx.workshopId))).returning()
    return maskView(changed!)
  })
}
