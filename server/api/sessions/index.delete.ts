import { requirePerson } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { endOtherSessions } from '#server/services/people/end-session'

/** Ends every session of the person but the one that asks. */
export default defineApiHandler(async (event) => {
  await endOtherSessions(await requirePerson(event))
  return null
})
