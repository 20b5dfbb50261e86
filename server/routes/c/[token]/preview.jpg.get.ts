import { database } from '#server/db/client'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { sendStored } from '#server/http/send-stored'
import { objectStore } from '#server/photos/object-store'
import { publicPreview } from '#server/services/cards/public-card'
import { CardTokenParams } from '#shared/cards/card'

/** The picture a link preview shows of a shared card. */
export default defineApiHandler(async (event) => {
  const { token } = parseParams(event, CardTokenParams)
  return sendStored(event, await publicPreview(database(), token, objectStore()), 'private, no-cache')
})
