import { findSession } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { forgetSessionId } from '#server/http/session-cookie'
import { endSession } from '#server/services/people/end-session'

export default defineApiHandler(async (event) => {
  const session = await findSession(event)
  if (session) await endSession(session, session.sessionId)
  await forgetSessionId(event)
  return null
})
