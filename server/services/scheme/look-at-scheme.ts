import { and, eq, sql } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { blanks, revisions, schemes } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { SchemeLookView } from '#shared/scheme/scheme-view'
import { schemeLookView } from './scheme-view'

/** A published scheme as the front desk sees it; one that was never published is not found. */
export async function lookAtScheme(ctx: Ctx, schemeId: string): Promise<SchemeLookView> {
  assertMay(ctx, 'scheme:look')
  return inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.select({
      id: schemes.id, name: schemes.name, fish: schemes.fish, blankId: blanks.id, blankName: blanks.name, headId: revisions.id, publishedAt: revisions.publishedAt,
    }).from(schemes)
      .innerJoin(revisions, and(eq(revisions.schemeId, schemes.id), eq(revisions.number, schemes.headNumber)))
      .innerJoin(blanks, sql`${blanks.id} = (${revisions.body} ->> 'blankId')::uuid`)
      .where(and(eq(schemes.id, schemeId), eq(schemes.workshopId, tx.workshopId)))
    if (!row) throw new Problem({ code: 'scheme/not-found' })
    return schemeLookView(row)
  })
}
