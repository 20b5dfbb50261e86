import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { etag } from '#server/http/versions'
import { retellFinish } from '#server/services/cards/retell-finish'
import { CardParams } from '#shared/cards/card'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'card:change')
  const card = await retellFinish(ctx, parseParams(event, CardParams).cardId)
  etag(event, card.version)
  return card
})
