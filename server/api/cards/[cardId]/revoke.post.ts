import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { etag } from '#server/http/versions'
import { revokeCard } from '#server/services/cards/share-card'
import { CardParams } from '#shared/cards/card'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'card:change')
  const card = await revokeCard(ctx, parseParams(event, CardParams).cardId)
  etag(event, card.version)
  return card
})
