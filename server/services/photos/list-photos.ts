import { and, asc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { photos, runs } from '#server/db/tables'
import type { PhotoView } from '#shared/photos/photo-view'
import { assertSchemeHere } from './photo-place'
import { photoView } from './photo-view'

/** A scheme's photos in the order they stand. */
export async function listPhotos(ctx: Ctx, schemeId: string): Promise<PhotoView[]> {
  assertMay(ctx, 'photo:read')
  return inTransaction(ctx, async (tx) => {
    await assertSchemeHere(tx, schemeId)
    const rows = await tx.db.select({ photo: photos, runNumber: runs.number }).from(photos)
      .leftJoin(runs, and(eq(runs.id, photos.runId), eq(runs.workshopId, photos.workshopId)))
      .where(and(eq(photos.schemeId, schemeId), eq(photos.workshopId, tx.workshopId)))
      .orderBy(asc(photos.position), asc(photos.createdAt), asc(photos.id))
    return rows.map(row => photoView(row.photo, row.runNumber))
  })
}
