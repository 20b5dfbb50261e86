import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { listMasks } from '#server/services/blank/list-masks'

export default defineApiHandler(async event => listMasks(await requireContext(event, 'mask:read')))
