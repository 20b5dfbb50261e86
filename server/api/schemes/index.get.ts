import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { keyAfter, keysetPage } from '#server/http/keyset'
import { parseQuery } from '#server/http/parse'
import { listSchemes, schemeKey, SchemesAfter } from '#server/services/scheme/list-schemes'
import { SchemeQuery } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:look')
  const query = parseQuery(event, SchemeQuery)
  const rows = await listSchemes(ctx, query, keyAfter(query.after, SchemesAfter))
  return keysetPage(rows, query.limit, schemeKey)
})
