import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { getReport } from '#server/services/bench/get-report'
import { RunParams } from '#shared/bench/run-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:read')
  return getReport(ctx, parseParams(event, RunParams).runId)
})
