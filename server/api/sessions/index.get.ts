import { requirePerson } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { listSessions } from '#server/services/people/list-sessions'

export default defineApiHandler(async event => listSessions(await requirePerson(event)))
