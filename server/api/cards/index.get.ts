import { z } from 'zod'
import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseQuery } from '#server/http/parse'
import { listCards } from '#server/services/cards/list-cards'

const Query = z.object({ schemeId: z.uuid().optional() })

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'card:read')
  return listCards(ctx, parseQuery(event, Query).schemeId)
})
