import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { listBlanks } from '#server/services/blank/list-blanks'

export default defineApiHandler(async event => listBlanks(await requireContext(event, 'blank:read')))
