import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody } from '#server/http/parse'
import { invitePerson } from '#server/services/people/invitations'
import { InvitationDraft } from '#shared/people/invitation'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'people:change')
  const invitation = await invitePerson(ctx, await parseBody(event, InvitationDraft))
  setResponseStatus(event, 201)
  return invitation
})
