import { requirePerson } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { endSession } from '#server/services/people/end-session'
import { SessionParams } from '#shared/people/session'

export default defineApiHandler(async (event) => {
  const ctx = await requirePerson(event)
  await endSession(ctx, parseParams(event, SessionParams).sessionId)
  return null
})
