import { database } from '#server/db/client'
import { answerSession } from '#server/http/answer-session'
import { findSession } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { visitorOf } from '#server/http/visitor'
import { acceptInvitation } from '#server/services/people/accept-invitation'
import { LINKS_ADDRESS, countTry } from '#server/services/people/count-try'
import { Acceptance } from '#shared/people/invitation'
import { LinkParams } from '#shared/people/person'

export default defineApiHandler(async (event) => {
  const { token } = parseParams(event, LinkParams)
  const acceptance = await parseBody(event, Acceptance)
  const visitor = visitorOf(event)
  await countTry(database(), LINKS_ADDRESS, visitor.address)
  return answerSession(event, await acceptInvitation(database(), token, acceptance, visitor, await findSession(event)))
})
