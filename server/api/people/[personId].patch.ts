import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { changeRole } from '#server/services/people/change-role'
import { PersonParams, RoleChange } from '#shared/people/person'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'people:change')
  const { personId } = parseParams(event, PersonParams)
  const { role } = await parseBody(event, RoleChange)
  await changeRole(ctx, personId, role)
  return null
})
