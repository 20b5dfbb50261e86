import type { z } from 'zod'
import type { Page } from '#shared/api/page'
import { Problem } from '#shared/errors/problem'

/**
 * Where the wanted page starts: the sort key of the last row of the page before, checked; null for the first page.
 * A time in a key is text of whole milliseconds: compare with `date_trunc('milliseconds', …)`.
 */
export function keyAfter<S extends z.ZodType>(after: string | undefined, schema: S): z.output<S> | null {
  if (after === undefined) return null
  const result = schema.safeParse(keyIn(after))
  if (!result.success) throw new Problem({ code: 'input/invalid', fields: [{ path: 'after', message: 'No page starts here.' }] })
  return result.data
}

/** A page of `rows`, which were read one beyond `limit` to see whether there is more; `keyOf` gives a row's sort key. */
export function keysetPage<Row>(rows: readonly Row[], limit: number, keyOf: (row: Row) => readonly (string | number)[]): Page<Row> {
  const items = rows.slice(0, limit)
  const last = items.at(-1)
  const next = rows.length > limit && last ? Buffer.from(JSON.stringify(keyOf(last))).toString('base64url') : null
  return { items, next }
}

function keyIn(after: string): unknown {
  try {
    return JSON.parse(Buffer.from(after, 'base64url').toString('utf8'))
  }
  catch {
    return undefined
  }
}
