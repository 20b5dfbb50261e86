import { and, desc, eq, gt } from 'drizzle-orm'
import { sessions } from '#server/db/tables/people'
import type { PersonCtx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import type { OwnSessionView } from '#shared/people/session'

/** One's own sessions that still go on, last used first. */
export async function listSessions(ctx: PersonCtx): Promise<OwnSessionView[]> {
  const rows = await inTransaction(ctx, tx => tx.db.select().from(sessions)
    .where(and(eq(sessions.personId, tx.personId), gt(sessions.expiresAt, new Date())))
    .orderBy(desc(sessions.seenAt), desc(sessions.id)))
  return rows.map(row => ({
    id: row.id,
    device: row.device,
    signedInAt: row.createdAt.toISOString(),
    seenAt: row.seenAt.toISOString(),
    isThis: row.id === ctx.sessionId,
  }))
}
