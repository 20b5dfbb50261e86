import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody } from '#server/http/parse'
import { addBuildUp } from '#server/services/build-ups/change-build-up'
import { BuildUpDraft } from '#shared/scheme/build-up'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const draft = await parseBody(event, BuildUpDraft)
  return idempotent(event, ctx, 201, tx => addBuildUp(tx, draft))
})
