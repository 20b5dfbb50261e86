import { afterAnswer } from '#server/http/after-answer'
import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { keyAfter, keysetPage } from '#server/http/keyset'
import { parseQuery } from '#server/http/parse'
import { fillColours } from '#server/services/scheme/fill-colours'
import { listNear, NearAfter, nearKey } from '#server/services/scheme/list-near'
import { listSchemes, schemeKey, SchemesAfter } from '#server/services/scheme/list-schemes'
import { SchemeQuery } from '#shared/scheme/scheme-input'
import type { SchemeListPage } from '#shared/scheme/scheme-view'

export default defineApiHandler(async (event): Promise<SchemeListPage> => {
  const ctx = await requireContext(event, 'scheme:look')
  const query = parseQuery(event, SchemeQuery)
  // Whoever is at the wall may look for a colour next.
  afterAnswer(event, fillColours(ctx).then(() => {}))
  if (!query.near) {
    const rows = await listSchemes(ctx, query, keyAfter(query.after, SchemesAfter))
    return { ...keysetPage(rows, query.limit, schemeKey), near: {}, waiting: 0 }
  }
  const { rows, waiting } = await listNear(ctx, query, keyAfter(query.after, NearAfter))
  const { items, next } = keysetPage(rows, query.limit, nearKey)
  return { items: items.map(({ row }) => row), next, near: Object.fromEntries(items.map(({ row, near }) => [row.id, near])), waiting }
})
