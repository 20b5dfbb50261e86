import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { withdrawInvitation } from '#server/services/people/invitations'
import { InvitationParams } from '#shared/people/invitation'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'people:change')
  await withdrawInvitation(ctx, parseParams(event, InvitationParams).invitationId)
  return null
})
