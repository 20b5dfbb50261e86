import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { removeDemo } from '#server/services/people/change-workshop'
import { WorkshopParams } from '#shared/people/workshop'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'workshop:remove-demo')
  const { workshopId } = parseParams(event, WorkshopParams)
  await removeDemo(ctx, workshopId)
  return null
})
