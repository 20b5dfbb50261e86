import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody, parseParams } from '#server/http/parse'
import { addBottle } from '#server/services/shelf/change-bottle'
import { BottleDraft } from '#shared/shelf/bottle'
import { PaintParams } from '#shared/shelf/paint-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'shelf:change')
  const { paintId } = parseParams(event, PaintParams)
  const draft = await parseBody(event, BottleDraft)
  return idempotent(event, ctx, 201, tx => addBottle(tx, paintId, draft))
})
