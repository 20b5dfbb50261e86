import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { listSavedSearches } from '#server/services/scheme/saved-searches'

export default defineApiHandler(async event => listSavedSearches(await requireContext(event, 'scheme:look')))
