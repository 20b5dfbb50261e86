import { database } from '#server/db/client'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { visitorOf } from '#server/http/visitor'
import { LINKS_ADDRESS, countTry } from '#server/services/people/count-try'
import { resetPassword } from '#server/services/people/reset-password'
import { LinkParams, PasswordReset } from '#shared/people/person'

export default defineApiHandler(async (event) => {
  const { token } = parseParams(event, LinkParams)
  const { password } = await parseBody(event, PasswordReset)
  await countTry(database(), LINKS_ADDRESS, visitorOf(event).address)
  await resetPassword(database(), token, password)
  return null
})
