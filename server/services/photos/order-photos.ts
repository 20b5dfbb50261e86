import { and, asc, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { photos } from '#server/db/tables'
import { orderAsWished } from '#shared/photos/order-as-wished'
import { holdPhotosOf } from './photo-place'

/** Puts a scheme's photos in a new order; those that are not named, such as one that was added meanwhile, follow as they stood. */
export async function orderPhotos(ctx: Ctx, schemeId: string, photoIds: readonly string[]): Promise<void> {
  assertMay(ctx, 'photo:add')
  await inTransaction(ctx, async (tx) => {
    await holdPhotosOf(tx, schemeId)
    const standing = await tx.db.select({ id: photos.id, position: photos.position }).from(photos)
      .where(and(eq(photos.schemeId, schemeId), eq(photos.workshopId, tx.workshopId)))
      .orderBy(asc(photos.position), asc(photos.createdAt), asc(photos.id))
    for (const [position, photo] of orderAsWished(standing, photoIds).entries()) {
      if (photo.position === position) continue
      await tx.db.update(photos).set({ position }).where(and(eq(photos.id, photo.id), eq(photos.workshopId, tx.workshopId)))
    }
  })
}
