import { eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { schemes } from '#server/db/tables'
import type { SchemeChange } from '#shared/scheme/scheme-input'
import type { SchemeView } from '#shared/scheme/scheme-view'
import { getScheme } from './get-scheme'
import { holdScheme } from './scheme-in-workshop'

/**
 * Gives a scheme another name or fish, takes it out of the lists or back into them, when it is still at `version`.
 * The draft, and when it was worked on, stay as they are; so do revisions, runs and cards.
 */
export async function changeScheme(ctx: Ctx, schemeId: string, version: number, change: SchemeChange): Promise<SchemeView> {
  assertMay(ctx, 'scheme:change')
  return inTransaction(ctx, async (tx) => {
    const scheme = await holdScheme(tx, schemeId, version)
    await tx.db.update(schemes).set({ ...change, version: scheme.version + 1 }).where(eq(schemes.id, scheme.id))
    return getScheme(tx, schemeId)
  })
}
