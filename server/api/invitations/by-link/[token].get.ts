import { database } from '#server/db/client'
import { findSession } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { visitorOf } from '#server/http/visitor'
import { findInvitation } from '#server/services/people/accept-invitation'
import { LINKS_ADDRESS, countTry } from '#server/services/people/count-try'
import { LinkParams } from '#shared/people/person'

export default defineApiHandler(async (event) => {
  const { token } = parseParams(event, LinkParams)
  await countTry(database(), LINKS_ADDRESS, visitorOf(event).address)
  return findInvitation(database(), token, await findSession(event))
})
