import { database } from '#server/db/client'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { visitorOf } from '#server/http/visitor'
import { LINKS_ADDRESS, countTry } from '#server/services/people/count-try'
import { checkPasswordReset } from '#server/services/people/reset-password'
import { LinkParams } from '#shared/people/person'

export default defineApiHandler(async (event) => {
  const { token } = parseParams(event, LinkParams)
  await countTry(database(), LINKS_ADDRESS, visitorOf(event).address)
  await checkPasswordReset(database(), token)
  return null
})
