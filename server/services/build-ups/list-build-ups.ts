import { asc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { buildUps } from '#server/db/tables'
import type { BuildUpView } from '#shared/scheme/build-up'
import { buildUpView } from './build-up-view'

/** Every build-up of the workshop, by name; those put away too, since coats may still be linked to them. */
export async function listBuildUps(ctx: Ctx): Promise<BuildUpView[]> {
  assertMay(ctx, 'scheme:read')
  return inTransaction(ctx, async (tx) => {
    const rows = await tx.db.select().from(buildUps).where(eq(buildUps.workshopId, tx.workshopId)).orderBy(asc(buildUps.name), asc(buildUps.id))
    return rows.map(buildUpView)
  })
}
