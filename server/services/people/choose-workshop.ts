import { and, eq } from 'drizzle-orm'
import { memberships, sessions } from '#server/db/tables/people'
import type { PersonCtx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { Problem } from '#shared/errors/problem'

/** Takes this session over to another of the person's workshops. */
export async function chooseWorkshop(ctx: PersonCtx, workshopId: string): Promise<void> {
  await inTransaction(ctx, async (tx) => {
    const [place] = await tx.db.select({ role: memberships.role }).from(memberships)
      .where(and(eq(memberships.workshopId, workshopId), eq(memberships.personId, tx.personId)))
    if (!place) throw new Problem({ code: 'workshop/not-found' })
    await tx.db.update(sessions).set({ workshopId }).where(eq(sessions.id, tx.sessionId))
  })
}
