import { requirePerson } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody } from '#server/http/parse'
import { changePassword } from '#server/services/people/change-password'
import { PasswordChange } from '#shared/people/person'

export default defineApiHandler(async (event) => {
  const ctx = await requirePerson(event)
  await changePassword(ctx, await parseBody(event, PasswordChange))
  return null
})
