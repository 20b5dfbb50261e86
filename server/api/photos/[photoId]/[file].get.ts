import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { sendStored } from '#server/http/send-stored'
import { objectStore } from '#server/photos/object-store'
import { getPhotoFile } from '#server/services/photos/get-photo-file'
import { PhotoFileParams } from '#shared/photos/photo-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'photo:read')
  const { photoId, file } = parseParams(event, PhotoFileParams)
  return sendStored(event, await getPhotoFile(ctx, photoId, file, objectStore()), 'private, max-age=86400, immutable')
})
