import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { etag } from '#server/http/versions'
import { getPaint } from '#server/services/shelf/get-paint'
import { PaintParams } from '#shared/shelf/paint-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'shelf:read')
  const paint = await getPaint(ctx, parseParams(event, PaintParams).paintId)
  etag(event, paint.version)
  return paint
})
