import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody } from '#server/http/parse'
import { addCard } from '#server/services/cards/add-card'
import { NewCard } from '#shared/cards/card'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'card:change')
  const { schemeId } = await parseBody(event, NewCard)
  return idempotent(event, ctx, 201, tx => addCard(tx, schemeId))
})
