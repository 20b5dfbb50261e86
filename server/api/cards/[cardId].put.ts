import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { changeCard } from '#server/services/cards/change-card'
import { CardDraft, CardParams } from '#shared/cards/card'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'card:change')
  const { cardId } = parseParams(event, CardParams)
  const version = requireIfMatch(event)
  const card = await changeCard(ctx, cardId, version, await parseBody(event, CardDraft))
  etag(event, card.version)
  return card
})
