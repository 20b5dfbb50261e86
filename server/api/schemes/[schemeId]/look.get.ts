import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { lookAtScheme } from '#server/services/scheme/look-at-scheme'
import { SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:look')
  const { schemeId } = parseParams(event, SchemeParams)
  return lookAtScheme(ctx, schemeId)
})
