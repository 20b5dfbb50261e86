import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { saveDraft } from '#server/services/scheme/save-draft'
import { DraftSave, SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const { schemeId } = parseParams(event, SchemeParams)
  const version = requireIfMatch(event)
  const { body } = await parseBody(event, DraftSave)
  const saved = await saveDraft(ctx, schemeId, version, body)
  etag(event, saved.version)
  return saved
})
