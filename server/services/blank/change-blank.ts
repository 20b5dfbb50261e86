import { isDeepStrictEqual } from 'node:util'
import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { blanks } from '#server/db/tables'
import type { BlankChange, BlankDraft, BlankView } from '#shared/blank/blank-view'
import { Problem } from '#shared/errors/problem'
import { blankView } from './blank-view'
import { schemesOn } from './schemes-on'

/** Adds a blank of the workshop's own. */
export async function addBlank(ctx: Ctx, draft: BlankDraft): Promise<BlankView> {
  assertMay(ctx, 'blank:change')
  return inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.insert(blanks).values({ workshopId: tx.workshopId, name: draft.name, shape: draft.shape }).returning()
    return blankView(row!, 0)
  })
}

/** Changes a blank that is still at `version`. A built-in one can be renamed and retired, not redrawn. Revisions keep the shape they froze. */
export async function changeBlank(ctx: Ctx, blankId: string, version: number, change: BlankChange): Promise<BlankView> {
  assertMay(ctx, 'blank:change')
  return inTransaction(ctx, async (tx) => {
    const [found] = await tx.db.select({ row: blanks, schemes: schemesOn }).from(blanks)
      .where(and(eq(blanks.id, blankId), eq(blanks.workshopId, tx.workshopId))).for('update', { of: blanks })
    if (!found) throw new Problem({ code: 'blank/not-found' })
    const { row, schemes } = found
    if (row.version !== version) throw new Problem({ code: 'blank/changed-meanwhile' })
    if (row.builtIn && !isDeepStrictEqual(row.shape, change.shape)) throw new Problem({ code: 'blank/built-in' })
    const [changed] = await tx.db.update(blanks)
      .set({ name: change.name, shape: change.shape, retired: change.retired ?? row.retired, version: version + 1 })
      .where(and(eq(blanks.id, blankId), eq(blanks.workshopId, tx.workshopId))).returning()
    return blankView(changed!, schemes)
  })
}
