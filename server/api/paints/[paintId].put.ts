import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { changePaint } from '#server/services/shelf/change-paint'
import { PaintChange, PaintParams } from '#shared/shelf/paint-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'shelf:change')
  const { paintId } = parseParams(event, PaintParams)
  const version = requireIfMatch(event)
  const paint = await changePaint(ctx, paintId, version, await parseBody(event, PaintChange))
  etag(event, paint.version)
  return paint
})
