import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { keyAfter, keysetPage } from '#server/http/keyset'
import { parseQuery } from '#server/http/parse'
import { listRuns, runKey, RunsAfter } from '#server/services/bench/list-runs'
import { RunQuery } from '#shared/bench/run-view'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'run:read')
  const query = parseQuery(event, RunQuery)
  const rows = await listRuns(ctx, query, keyAfter(query.after, RunsAfter))
  return keysetPage(rows, query.limit, runKey)
})
