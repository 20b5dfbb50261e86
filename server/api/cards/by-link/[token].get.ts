import { database } from '#server/db/client'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { cardByLink } from '#server/services/cards/public-card'
import { CardTokenParams } from '#shared/cards/card'

/** Open to whoever holds the link. */
export default defineApiHandler(async (event) => {
  setResponseHeader(event, 'cache-control', 'private, no-cache')
  return cardByLink(database(), parseParams(event, CardTokenParams).token)
})
