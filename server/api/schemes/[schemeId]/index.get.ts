import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { etag } from '#server/http/versions'
import { getScheme } from '#server/services/scheme/get-scheme'
import { SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:read')
  const { schemeId } = parseParams(event, SchemeParams)
  const scheme = await getScheme(ctx, schemeId)
  etag(event, scheme.version)
  return scheme
})
