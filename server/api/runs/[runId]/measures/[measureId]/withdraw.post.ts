import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { withdrawMeasure } from '#server/services/bench/withdraw-measure'
import { RunMeasureParams } from '#shared/bench/run-measure'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:record')
  const { runId, measureId } = parseParams(event, RunMeasureParams)
  return withdrawMeasure(ctx, runId, measureId)
})
