import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody, parseQuery } from '#server/http/parse'
import { takeInPaints } from '#server/services/files/take-in-paints'
import { PAINTS_FILE_MAX } from '#shared/files/paints-csv'
import { PaintsFile } from '#shared/files/paints-plan'
import { TakeInQuery } from '#shared/files/take-in-plan'

/** Text as JSON may be twice as long as the text. */
const BODY_MAX = 2 * PAINTS_FILE_MAX

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'shelf:change')
  const { dryRun } = parseQuery(event, TakeInQuery)
  const { csv } = await parseBody(event, PaintsFile, BODY_MAX)
  return dryRun ? takeInPaints(ctx, csv, true) : idempotent(event, ctx, 201, tx => takeInPaints(tx, csv, false))
})
