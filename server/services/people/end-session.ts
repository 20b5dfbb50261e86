import { and, eq, ne } from 'drizzle-orm'
import { sessions } from '#server/db/tables/people'
import type { PersonCtx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { Problem } from '#shared/errors/problem'

/** Ends one of one's own sessions, this one or another; from then on its cookie opens nothing. */
export async function endSession(ctx: PersonCtx, sessionId: string): Promise<void> {
  const ended = await inTransaction(ctx, tx => tx.db.delete(sessions)
    .where(and(eq(sessions.id, sessionId), eq(sessions.personId, tx.personId))).returning({ id: sessions.id }))
  if (ended.length === 0) throw new Problem({ code: 'people/not-found' })
}

/** Ends all of one's sessions but this one. */
export async function endOtherSessions(ctx: PersonCtx): Promise<void> {
  await inTransaction(ctx, tx => tx.db.delete(sessions)
    .where(and(eq(sessions.personId, tx.personId), ne(sessions.id, tx.sessionId))))
}
