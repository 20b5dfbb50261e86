import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { listRevisions } from '#server/services/scheme/list-revisions'
import { SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:read')
  const { schemeId } = parseParams(event, SchemeParams)
  return { items: await listRevisions(ctx, schemeId) }
})
