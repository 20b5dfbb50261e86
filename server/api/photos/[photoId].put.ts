import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { changePhoto } from '#server/services/photos/change-photo'
import { PhotoChange, PhotoParams } from '#shared/photos/photo-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'photo:add')
  const { photoId } = parseParams(event, PhotoParams)
  return changePhoto(ctx, photoId, await parseBody(event, PhotoChange))
})
