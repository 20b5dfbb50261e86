import { asc, eq } from 'drizzle-orm'
import { memberships, persons } from '#server/db/tables/people'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { may } from '#shared/people/may'
import type { PersonView } from '#shared/people/person'

/** Everybody in the workshop by name; their addresses only for those who may change people. */
export async function listPeople(ctx: Ctx): Promise<PersonView[]> {
  assertMay(ctx, 'people:read')
  const rows = await inTransaction(ctx, tx => tx.db
    .select({ id: persons.id, name: persons.name, email: persons.email, role: memberships.role, since: memberships.createdAt })
    .from(memberships).innerJoin(persons, eq(persons.id, memberships.personId))
    .where(eq(memberships.workshopId, tx.workshopId)).orderBy(asc(persons.name), asc(persons.id)))
  return rows.map(row => ({
    id: row.id,
    name: row.name,
    email: may(ctx.role, 'people:change') || row.id === ctx.personId ? row.email : null,
    role: row.role,
    since: row.since.toISOString(),
    isYou: row.id === ctx.personId,
  }))
}
