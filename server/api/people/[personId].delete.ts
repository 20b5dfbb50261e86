import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { removePerson } from '#server/services/people/change-role'
import { PersonParams } from '#shared/people/person'

export default defineApiHandler(async (event) => {
  // Everybody may leave; taking out somebody else is refused by the verb.
  const ctx = await requireContext(event, 'people:read')
  const { personId } = parseParams(event, PersonParams)
  await removePerson(ctx, personId)
  return null
})
