import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody, parseParams } from '#server/http/parse'
import { forkScheme } from '#server/services/scheme/fork-scheme'
import { Fork, SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const { schemeId } = parseParams(event, SchemeParams)
  const fork = await parseBody(event, Fork)
  return idempotent(event, ctx, 201, tx => forkScheme(tx, schemeId, fork))
})
