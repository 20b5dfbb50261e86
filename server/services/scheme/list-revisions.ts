import { and, desc, eq, sql } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { persons, revisions } from '#server/db/tables'
import type { RevisionListItem } from '#shared/scheme/scheme-view'
import { schemeInWorkshop } from './scheme-in-workshop'
import { revisionListItem } from './scheme-view'

const coats = sql<number>`jsonb_array_length(jsonb_path_query_array(${revisions.body}, '$.stack[*] ? (@.act == "coat")'))`

/** Every revision of a scheme, newest first, without bodies. */
export async function listRevisions(ctx: Ctx, schemeId: string): Promise<RevisionListItem[]> {
  assertMay(ctx, 'scheme:read')
  return inTransaction(ctx, async (tx) => {
    const scheme = await schemeInWorkshop(tx, schemeId)
    const rows = await tx.db.select({
      id: revisions.id, number: revisions.number, note: revisions.note, publishedAt: revisions.publishedAt, publishedBy: revisions.publishedBy,
      coats, name: persons.name,
    }).from(revisions).leftJoin(persons, eq(persons.id, revisions.publishedBy))
      .where(and(eq(revisions.schemeId, scheme.id), eq(revisions.workshopId, tx.workshopId))).orderBy(desc(revisions.number))
    return rows.map(row => revisionListItem(row, row.coats, row.name))
  })
}
