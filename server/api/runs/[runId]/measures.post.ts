import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody, parseParams } from '#server/http/parse'
import { addMeasure } from '#server/services/bench/add-measure'
import { RunMeasureDraft } from '#shared/bench/run-measure'
import { RunParams } from '#shared/bench/run-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:record')
  const { runId } = parseParams(event, RunParams)
  const draft = await parseBody(event, RunMeasureDraft)
  return idempotent(event, ctx, 201, tx => addMeasure(tx, runId, draft))
})
