import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams, parseQuery } from '#server/http/parse'
import { getRunEvents } from '#server/services/bench/get-run'
import { EventsQuery, RunParams } from '#shared/bench/run-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:read')
  const { runId } = parseParams(event, RunParams)
  const { since } = parseQuery(event, EventsQuery)
  return getRunEvents(ctx, runId, since)
})
