import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { beHere } from '#server/services/scheme/be-here'
import { HereBeat } from '#shared/scheme/presence'
import { SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:read')
  const { schemeId } = parseParams(event, SchemeParams)
  await beHere(ctx, schemeId, await parseBody(event, HereBeat))
  setResponseStatus(event, 204)
})
