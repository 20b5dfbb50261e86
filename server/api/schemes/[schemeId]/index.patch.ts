import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { changeScheme } from '#server/services/scheme/change-scheme'
import { SchemeChange, SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const { schemeId } = parseParams(event, SchemeParams)
  const version = requireIfMatch(event)
  const change = await parseBody(event, SchemeChange)
  const scheme = await changeScheme(ctx, schemeId, version, change)
  etag(event, scheme.version)
  return scheme
})
