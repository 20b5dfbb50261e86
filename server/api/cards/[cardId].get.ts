import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { etag } from '#server/http/versions'
import { getCard } from '#server/services/cards/list-cards'
import { CardParams } from '#shared/cards/card'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'card:read')
  const card = await getCard(ctx, parseParams(event, CardParams).cardId)
  etag(event, card.version)
  return card
})
