import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseQuery } from '#server/http/parse'
import { findBottles } from '#server/services/shelf/list-bottles'
import { BottleQuery } from '#shared/shelf/bottle'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'shelf:read')
  return findBottles(ctx, parseQuery(event, BottleQuery))
})
