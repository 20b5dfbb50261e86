import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { orderPhotos } from '#server/services/photos/order-photos'
import { listPhotos } from '#server/services/photos/list-photos'
import { PhotoOrder } from '#shared/photos/photo-view'
import { SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'photo:add')
  const { schemeId } = parseParams(event, SchemeParams)
  await orderPhotos(ctx, schemeId, (await parseBody(event, PhotoOrder)).photoIds)
  return listPhotos(ctx, schemeId)
})
