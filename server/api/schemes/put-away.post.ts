import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody } from '#server/http/parse'
import { putAway } from '#server/services/scheme/put-away'
import { PutAway } from '#shared/scheme/wall/wall-wish'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  return putAway(ctx, await parseBody(event, PutAway))
})
