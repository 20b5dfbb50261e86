import type { Database } from '#server/db/client'
import { memberships, workshops } from '#server/db/tables/people'
import { furnishWorkshop } from '#server/services/blank/furnish-workshop'
import type { Ctx, PersonCtx } from '#server/services/ctx'
import { declare, inTransaction } from '#server/services/in-transaction'
import { chooseWorkshop } from '#server/services/people/choose-workshop'

/** A new workshop with its blanks and masks, and its first owner. Works in the caller's transaction, which acts in the new workshop from here on. */
export async function openWorkshop(
  tx: Database, owner: { personId: string, sessionId: string }, name: string, { isDemo = false } = {},
): Promise<Ctx> {
  const workshopId = crypto.randomUUID()
  await declare(tx, { workshopId })
  await tx.insert(workshops).values({ id: workshopId, name, isDemo })
  await tx.insert(memberships).values({ workshopId, personId: owner.personId, role: 'owner' })
  const ctx: Ctx = { ...owner, db: tx, workshopId, role: 'owner' }
  await furnishWorkshop(ctx)
  return ctx
}

/** One more workshop for somebody who is signed in; their session goes over to it. */
export async function addWorkshop(ctx: PersonCtx, name: string): Promise<string> {
  return inTransaction(ctx, async (tx) => {
    const { workshopId } = await openWorkshop(tx.db, tx, name)
    await chooseWorkshop(tx, workshopId)
    return workshopId
  })
}
