import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody } from '#server/http/parse'
import { addBlank } from '#server/services/blank/change-blank'
import { BlankDraft } from '#shared/blank/blank-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'blank:change')
  const draft = await parseBody(event, BlankDraft)
  return idempotent(event, ctx, 201, tx => addBlank(tx, draft))
})
