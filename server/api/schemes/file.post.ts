import { z } from 'zod'
import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody, parseQuery } from '#server/http/parse'
import { lookAtSchemeFile, takeInScheme } from '#server/services/files/take-in-scheme'
import { checkedSchemeFile } from '#server/services/files/checked-scheme-file'
import { SCHEME_FILE_MAX } from '#shared/files/scheme-file'
import { TakeInQuery } from '#shared/files/take-in-plan'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const { dryRun } = parseQuery(event, TakeInQuery)
  const file = checkedSchemeFile(await parseBody(event, z.unknown(), SCHEME_FILE_MAX))
  return dryRun ? lookAtSchemeFile(ctx, file) : idempotent(event, ctx, 201, tx => takeInScheme(tx, file))
})
