import { requirePerson } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody } from '#server/http/parse'
import { getSession } from '#server/services/people/get-session'
import { addWorkshop } from '#server/services/people/open-workshop'
import { WorkshopDraft } from '#shared/people/workshop'

export default defineApiHandler(async (event) => {
  const ctx = await requirePerson(event)
  const { name } = await parseBody(event, WorkshopDraft)
  return idempotent(event, ctx, 201, async tx => getSession(tx, await addWorkshop(tx, name)))
})
