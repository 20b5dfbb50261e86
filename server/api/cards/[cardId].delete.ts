import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { removeCard } from '#server/services/cards/remove-card'
import { CardParams } from '#shared/cards/card'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'card:change')
  await removeCard(ctx, parseParams(event, CardParams).cardId)
  setResponseStatus(event, 204)
  return null
})
