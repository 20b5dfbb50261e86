import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { listInvitations } from '#server/services/people/invitations'

export default defineApiHandler(async event => listInvitations(await requireContext(event, 'people:change')))
