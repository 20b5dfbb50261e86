import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { getRun } from '#server/services/bench/get-run'
import { RunParams } from '#shared/bench/run-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:read')
  const { runId } = parseParams(event, RunParams)
  return getRun(ctx, runId)
})
