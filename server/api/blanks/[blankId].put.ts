import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { changeBlank } from '#server/services/blank/change-blank'
import { BlankChange, BlankParams } from '#shared/blank/blank-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'blank:change')
  const { blankId } = parseParams(event, BlankParams)
  const version = requireIfMatch(event)
  const blank = await changeBlank(ctx, blankId, version, await parseBody(event, BlankChange))
  etag(event, blank.version)
  return blank
})
