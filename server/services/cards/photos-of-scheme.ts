import { and, eq, inArray } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { photos } from '#server/db/tables'

/** Those of the wished photos that the scheme has, each once, in the order wished for. Call inside a transaction. */
export async function photosOfScheme(tx: Ctx, schemeId: string, wish: readonly string[]): Promise<string[]> {
  if (wish.length === 0) return []
  const own = await tx.db.select({ id: photos.id }).from(photos)
    .where(and(eq(photos.workshopId, tx.workshopId), eq(photos.schemeId, schemeId), inArray(photos.id, [...wish])))
  const known = new Set(own.map(photo => photo.id))
  return [...new Set(wish)].filter(id => known.has(id))
}
