import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams, parseQuery } from '#server/http/parse'
import { compareRevisions } from '#server/services/scheme/compare-revisions'
import { CompareQuery, SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:read')
  const { schemeId } = parseParams(event, SchemeParams)
  return compareRevisions(ctx, schemeId, parseQuery(event, CompareQuery))
})
