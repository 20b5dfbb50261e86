import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { recordActs } from '#server/services/bench/record-acts'
import { RunEventBatch } from '#shared/bench/run-event'
import { RunParams } from '#shared/bench/run-view'

/** Acts carry ids of their own, so that a batch may be sent again without a key. */
export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:record')
  const { runId } = parseParams(event, RunParams)
  const { events } = await parseBody(event, RunEventBatch)
  return { answers: await recordActs(ctx, runId, events) }
})
