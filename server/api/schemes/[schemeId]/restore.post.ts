import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { restoreRevision } from '#server/services/scheme/restore-revision'
import { Restore, SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const { schemeId } = parseParams(event, SchemeParams)
  const version = requireIfMatch(event)
  const { number } = await parseBody(event, Restore)
  const scheme = await restoreRevision(ctx, schemeId, version, number)
  etag(event, scheme.version)
  return scheme
})
