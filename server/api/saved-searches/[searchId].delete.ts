import { setResponseStatus } from 'h3'
import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { forgetSearch } from '#server/services/scheme/saved-searches'
import { SearchParams } from '#shared/scheme/wall/wall-wish'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:look')
  await forgetSearch(ctx, parseParams(event, SearchParams).searchId)
  setResponseStatus(event, 204)
  return null
})
