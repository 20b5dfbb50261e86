import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { listBottles } from '#server/services/shelf/list-bottles'
import { PaintParams } from '#shared/shelf/paint-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'shelf:read')
  return listBottles(ctx, parseParams(event, PaintParams).paintId)
})
