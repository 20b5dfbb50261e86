import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody } from '#server/http/parse'
import { addPaint } from '#server/services/shelf/add-paint'
import { PaintDraft } from '#shared/shelf/paint'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'shelf:change')
  const draft = await parseBody(event, PaintDraft)
  return idempotent(event, ctx, 201, tx => addPaint(tx, draft))
})
