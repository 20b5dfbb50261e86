import { and, asc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { photos, schemes } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { PhotoView } from '#shared/photos/photo-view'
import { photoView } from './photo-view'

/** A scheme's photos in the order they stand. */
export async function listPhotos(ctx: Ctx, schemeId: string): Promise<PhotoView[]> {
  assertMay(ctx, 'photo:read')
  return inTransaction(ctx, async (tx) => {
    const [scheme] = await tx.db.select({ id: schemes.id }).from(schemes).where(and(eq(schemes.id, schemeId), eq(schemes.workshopId, tx.workshopId)))
    if (!scheme) throw new Problem({ code: 'scheme/not-found' })
    const rows = await tx.db.select().from(photos)
      .where(and(eq(photos.schemeId, schemeId), eq(photos.workshopId, tx.workshopId))).orderBy(asc(photos.position), asc(photos.createdAt))
    return rows.map(photoView)
  })
}
