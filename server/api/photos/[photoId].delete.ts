import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { objectStore } from '#server/photos/object-store'
import { removePhoto } from '#server/services/photos/remove-photo'
import { PhotoParams } from '#shared/photos/photo-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'photo:remove')
  await removePhoto(ctx, parseParams(event, PhotoParams).photoId, objectStore())
  setResponseStatus(event, 204)
  return null
})
