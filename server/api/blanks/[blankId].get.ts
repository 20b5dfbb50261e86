import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { etag } from '#server/http/versions'
import { getBlank } from '#server/services/blank/list-blanks'
import { BlankParams } from '#shared/blank/blank-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'blank:read')
  const blank = await getBlank(ctx, parseParams(event, BlankParams).blankId)
  etag(event, blank.version)
  return blank
})
