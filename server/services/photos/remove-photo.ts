import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { photos } from '#server/db/tables'
import type { ObjectStore } from '#server/photos/object-store'
import { Problem } from '#shared/errors/problem'
import { removePhotoFiles } from './remove-photo-files'

/** Takes a photo away with all its files. Cards that showed it go on without it. */
export async function removePhoto(ctx: Ctx, photoId: string, store: ObjectStore): Promise<void> {
  assertMay(ctx, 'photo:remove')
  await inTransaction(ctx, async (tx) => {
    const gone = await tx.db.delete(photos).where(and(eq(photos.id, photoId), eq(photos.workshopId, tx.workshopId))).returning({ id: photos.id })
    if (gone.length === 0) throw new Problem({ code: 'photo/not-found' })
  })
  await removePhotoFiles(ctx.workshopId, photoId, store)
}
