import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { changeWorkshop } from '#server/services/people/change-workshop'
import { workshopView } from '#server/services/people/workshop-view'
import { WorkshopChange, WorkshopParams } from '#shared/people/workshop'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'workshop:change')
  const { workshopId } = parseParams(event, WorkshopParams)
  return workshopView(await changeWorkshop(ctx, workshopId, await parseBody(event, WorkshopChange)))
})
