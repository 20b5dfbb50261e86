import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { recordActs } from '#server/services/bench/record-acts'
import { RunEventBatch } from '#shared/bench/run-event'
import { RunParams } from '#shared/bench/run-view'

/** Acts carry ids of their own, so that a batch may be sent again without a key. The answer tells the server's time. */
export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:record')
  const { runId } = parseParams(event, RunParams)
  const { events, sentAt } = await parseBody(event, RunEventBatch)
  const clockBehind = sentAt === undefined ? 0 : Date.now() - Date.parse(sentAt)
  return { answers: await recordActs(ctx, runId, events, clockBehind), now: new Date().toISOString() }
})
