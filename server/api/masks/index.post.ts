import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody } from '#server/http/parse'
import { addMask } from '#server/services/blank/change-mask'
import { MaskDraft } from '#shared/scheme/mask-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'mask:change')
  const draft = await parseBody(event, MaskDraft)
  return idempotent(event, ctx, 201, tx => addMask(tx, draft))
})
