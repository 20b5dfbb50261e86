import { setResponseHeaders } from 'h3'
import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseQuery } from '#server/http/parse'
import { writePaintsFile } from '#server/services/files/write-paints-file'
import { PaintsFileQuery } from '#shared/files/paints-plan'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'shelf:read')
  const csv = await writePaintsFile(ctx, parseQuery(event, PaintsFileQuery))
  setResponseHeaders(event, {
    'content-type': 'text/csv; charset=utf-8',
    'content-disposition': 'attachment; filename="shelf.csv"',
    'cache-control': 'private, no-store',
  })
  return csv
})
