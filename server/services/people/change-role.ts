import { and, eq } from 'drizzle-orm'
import { memberships, sessions, workshops } from '#server/db/tables/people'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { Problem } from '#shared/errors/problem'
import type { Role } from '#shared/people/roles'

/** Gives somebody of the workshop another role; it holds from their next request on. The last owner stays one. */
export async function changeRole(ctx: Ctx, personId: string, role: Role): Promise<void> {
  assertMay(ctx, 'people:change')
  await inTransaction(ctx, async (tx) => {
    await refuseWithoutOwner(tx, personId, role)
    await tx.db.update(memberships).set({ role }).where(membershipOf(tx, personId))
  })
}

/**
 * Takes somebody out of the workshop; what they made stays, and their sessions in it end.
 * An owner may take out anybody, everybody may leave; the last owner may not.
 */
export async function removePerson(ctx: Ctx, personId: string): Promise<void> {
  if (personId !== ctx.personId) assertMay(ctx, 'people:change')
  await inTransaction(ctx, async (tx) => {
    await refuseWithoutOwner(tx, personId, null)
    await tx.db.delete(sessions)
      .where(and(eq(sessions.personId, personId), eq(sessions.workshopId, tx.workshopId)))
    await tx.db.delete(memberships).where(membershipOf(tx, personId))
  })
}

/** Refuses a change after which the workshop had no owner. Holds the workshop's row, so that two owners cannot each let the other go. */
async function refuseWithoutOwner(tx: Ctx, personId: string, next: Role | null): Promise<void> {
  await tx.db.select({ id: workshops.id }).from(workshops).where(eq(workshops.id, tx.workshopId)).for('update')
  const [person] = await tx.db.select({ role: memberships.role }).from(memberships).where(membershipOf(tx, personId))
  if (!person) throw new Problem({ code: 'people/not-found' })
  if (person.role !== 'owner' || next === 'owner') return
  const owners = await tx.db.$count(memberships, and(eq(memberships.workshopId, tx.workshopId), eq(memberships.role, 'owner')))
  if (owners < 2) throw new Problem({ code: 'people/last-owner' })
}

function membershipOf(tx: Ctx, personId: string) {
  return and(eq(memberships.workshopId, tx.workshopId), eq(memberships.personId, personId))
}
