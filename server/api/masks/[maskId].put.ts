import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { changeMask } from '#server/services/blank/change-mask'
import { MaskChange, MaskParams } from '#shared/scheme/mask-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'mask:change')
  const { maskId } = parseParams(event, MaskParams)
  const version = requireIfMatch(event)
  const mask = await changeMask(ctx, maskId, version, await parseBody(event, MaskChange))
  etag(event, mask.version)
  return mask
})
