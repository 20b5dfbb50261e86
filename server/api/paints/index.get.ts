import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { listPaints } from '#server/services/shelf/list-paints'

export default defineApiHandler(async event => listPaints(await requireContext(event, 'shelf:read')))
