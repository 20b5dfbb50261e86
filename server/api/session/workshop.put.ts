import { requirePerson } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody } from '#server/http/parse'
import { chooseWorkshop } from '#server/services/people/choose-workshop'
import { getSession } from '#server/services/people/get-session'
import { WorkshopChoice } from '#shared/people/workshop'

export default defineApiHandler(async (event) => {
  const ctx = await requirePerson(event)
  const { workshopId } = await parseBody(event, WorkshopChoice)
  await chooseWorkshop(ctx, workshopId)
  return getSession(ctx, workshopId)
})
