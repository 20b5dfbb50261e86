import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { listChoices } from '#server/services/scheme/list-choices'

export default defineApiHandler(async event => listChoices(await requireContext(event, 'scheme:look')))
