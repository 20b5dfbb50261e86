import { and, eq, gt } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { memberships, sessions } from '#server/db/tables/people'
import type { PersonCtx } from '#server/services/ctx'
import { declare, inTransactionAs } from '#server/services/in-transaction'
import { SEEN_EVERY, SESSION_LASTS } from '#server/services/people/session-limits'
import type { Role } from '#shared/people/roles'

/** A session that goes on: who it is, and their place in the workshop it is in, if they still have one. */
export interface ResumedSession extends PersonCtx {
  membership: { workshopId: string, role: Role } | null
}

/**
 * The session behind a cookie, or null when it ended: signed out anywhere, expired, or its person removed.
 * Read anew for every request, so that whatever changed holds at once and on every process.
 */
export async function resumeSession(db: Database, sessionId: string, now = new Date()): Promise<ResumedSession | null> {
  return inTransactionAs(db, { sessionId }, async (tx) => {
    const [session] = await tx.select().from(sessions).where(and(eq(sessions.id, sessionId), gt(sessions.expiresAt, now)))
    if (!session) return null

    await declare(tx, { personId: session.personId, workshopId: session.workshopId })
    if (now.getTime() - session.seenAt.getTime() > SEEN_EVERY)
      await tx.update(sessions).set({ seenAt: now, expiresAt: new Date(now.getTime() + SESSION_LASTS) }).where(eq(sessions.id, sessionId))

    const [membership] = session.workshopId === null
      ? []
      : await tx.select({ workshopId: memberships.workshopId, role: memberships.role }).from(memberships)
          .where(and(eq(memberships.workshopId, session.workshopId), eq(memberships.personId, session.personId)))
    return { db, sessionId, personId: session.personId, membership: membership ?? null }
  })
}
