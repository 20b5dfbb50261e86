import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { getWorkshop } from '#server/services/people/change-workshop'
import { workshopView } from '#server/services/people/workshop-view'
import { WorkshopParams } from '#shared/people/workshop'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'workshop:read')
  const { workshopId } = parseParams(event, WorkshopParams)
  return workshopView(await getWorkshop(ctx, workshopId))
})
