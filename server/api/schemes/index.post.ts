import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { idempotent } from '#server/http/idempotent'
import { parseBody } from '#server/http/parse'
import { createScheme } from '#server/services/scheme/create-scheme'
import { SchemeStart } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:change')
  const start = await parseBody(event, SchemeStart)
  return idempotent(event, ctx, 201, tx => createScheme(tx, start))
})
