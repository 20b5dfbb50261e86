import type { Database } from '#server/db/client'
import { sessions } from '#server/db/tables/people'
import { declare } from '#server/services/in-transaction'
import { SESSION_LASTS } from '#server/services/people/session-limits'

/** A new session of a person whose right to it was just shown; its id goes into the sealed cookie. */
export async function openSession(tx: Database, personId: string, workshopId: string | null, device: string): Promise<string> {
  const id = crypto.randomUUID()
  await declare(tx, { personId, sessionId: id, workshopId })
  await tx.insert(sessions).values({ id, personId, workshopId, device, expiresAt: new Date(Date.now() + SESSION_LASTS) })
  return id
}
