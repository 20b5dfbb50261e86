import { findSession } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { getSession } from '#server/services/people/get-session'
import type { SessionView } from '#shared/people/session'

export default defineApiHandler(async (event): Promise<{ session: SessionView | null }> => {
  const session = await findSession(event)
  return { session: session && await getSession(session, session.membership?.workshopId ?? null) }
})
