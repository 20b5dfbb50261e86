import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams, parseQuery } from '#server/http/parse'
import { getMaterials } from '#server/services/scheme/get-materials'
import { MaterialsQuery, SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:read')
  const { schemeId } = parseParams(event, SchemeParams)
  const { blankId } = parseQuery(event, MaterialsQuery)
  return getMaterials(ctx, schemeId, blankId)
})
