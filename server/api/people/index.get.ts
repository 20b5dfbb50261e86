import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { listPeople } from '#server/services/people/list-people'

export default defineApiHandler(async event => listPeople(await requireContext(event, 'people:read')))
