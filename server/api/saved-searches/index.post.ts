import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody } from '#server/http/parse'
import { saveSearch } from '#server/services/scheme/saved-searches'
import { SearchToSave } from '#shared/scheme/wall/wall-wish'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:look')
  const search = await parseBody(event, SearchToSave)
  return idempotent(event, ctx, 201, tx => saveSearch(tx, search))
})
