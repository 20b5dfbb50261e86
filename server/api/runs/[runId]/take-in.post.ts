import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { etag, requireIfMatch } from '#server/http/versions'
import { takeIn } from '#server/services/bench/take-in'
import { RunParams } from '#shared/bench/run-view'

/** `If-Match` names the version of the scheme's draft that the run is taken into. */
export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const { runId } = parseParams(event, RunParams)
  const taken = await takeIn(ctx, runId, requireIfMatch(event))
  etag(event, taken.version)
  return taken
})
