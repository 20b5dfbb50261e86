import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { listPhotos } from '#server/services/photos/list-photos'
import { SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'photo:read')
  return listPhotos(ctx, parseParams(event, SchemeParams).schemeId)
})
