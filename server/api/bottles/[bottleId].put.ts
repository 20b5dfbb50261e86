import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { changeBottle } from '#server/services/shelf/change-bottle'
import { BottleDraft, BottleParams } from '#shared/shelf/bottle'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'shelf:change')
  const { bottleId } = parseParams(event, BottleParams)
  const version = requireIfMatch(event)
  const bottle = await changeBottle(ctx, bottleId, version, await parseBody(event, BottleDraft))
  etag(event, bottle.version)
  return bottle
})
