import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody } from '#server/http/parse'
import { startRun } from '#server/services/bench/start-run'
import { RunStart } from '#shared/bench/run-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:record')
  const start = await parseBody(event, RunStart)
  return idempotent(event, ctx, 201, tx => startRun(tx, start))
})
