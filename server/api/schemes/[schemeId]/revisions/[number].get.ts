import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { getRevision } from '#server/services/scheme/get-revision'
import { RevisionParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:read')
  const { schemeId, number } = parseParams(event, RevisionParams)
  return getRevision(ctx, schemeId, number)
})
