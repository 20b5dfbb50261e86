import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { listBuildUps } from '#server/services/build-ups/list-build-ups'

export default defineApiHandler(async event => listBuildUps(await requireContext(event, 'scheme:read')))
