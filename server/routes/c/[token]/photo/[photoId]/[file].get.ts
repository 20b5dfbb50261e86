import { database } from '#server/db/client'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { sendStored } from '#server/http/send-stored'
import { objectStore } from '#server/photos/object-store'
import { publicPhoto } from '#server/services/cards/public-card'
import { CardTokenParams } from '#shared/cards/card'
import { PhotoFileParams } from '#shared/photos/photo-view'

/** A photo of a shared card, for whoever holds its link; asked again each time, so that revoking ends it. */
export default defineApiHandler(async (event) => {
  const { token } = parseParams(event, CardTokenParams)
  const { photoId, file } = parseParams(event, PhotoFileParams)
  return sendStored(event, await publicPhoto(database(), token, photoId, file, objectStore()), 'private, no-cache')
})
