import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody, parseParams } from '#server/http/parse'
import { requireIfMatch } from '#server/http/versions'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { Publish, SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const { schemeId } = parseParams(event, SchemeParams)
  const version = requireIfMatch(event)
  const publish = await parseBody(event, Publish)
  return idempotent(event, ctx, 201, tx => publishScheme(tx, schemeId, version, publish))
})
