import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { changeBuildUp } from '#server/services/build-ups/change-build-up'
import { BuildUpChange, BuildUpParams } from '#shared/scheme/build-up'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const { buildUpId } = parseParams(event, BuildUpParams)
  const version = requireIfMatch(event)
  const changed = await changeBuildUp(ctx, buildUpId, version, await parseBody(event, BuildUpChange))
  etag(event, changed.version)
  return changed
})
