import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { photos } from '#server/db/tables'
import type { ObjectStore } from '#server/photos/object-store'
import { photoKeys } from '#server/photos/photo-keys'
import type { PhotoChange, PhotoView } from '#shared/photos/photo-view'
import { photoInWorkshop, photoView } from './photo-view'

/** Changes the words that stand for a photo where it cannot be seen. */
export async function changePhoto(ctx: Ctx, photoId: string, change: PhotoChange): Promise<PhotoView> {
  assertMay(ctx, 'photo:add')
  return inTransaction(ctx, async (tx) => {
    await photoInWorkshop(tx, photoId)
    const [row] = await tx.db.update(photos).set({ alt: change.alt }).where(eq(photos.id, photoId)).returning()
    return photoView(row!)
  })
}

/** Puts a scheme's photos in a new order; ids that are not among them are left out. */
export async function orderPhotos(ctx: Ctx, schemeId: string, photoIds: readonly string[]): Promise<void> {
  assertMay(ctx, 'photo:add')
  await inTransaction(ctx, async (tx) => {
    for (const [position, id] of photoIds.entries())
      await tx.db.update(photos).set({ position }).where(and(eq(photos.id, id), eq(photos.schemeId, schemeId), eq(photos.workshopId, tx.workshopId)))
  })
}

/** Takes a photo away with all its files. Cards that showed it go on without it. */
export async function removePhoto(ctx: Ctx, photoId: string, store: ObjectStore): Promise<void> {
  assertMay(ctx, 'photo:remove')
  await inTransaction(ctx, async (tx) => {
    await photoInWorkshop(tx, photoId)
    await tx.db.delete(photos).where(eq(photos.id, photoId))
  })
  const keys: string[] = []
  for await (const { key } of store.list(photoKeys.folder(ctx.workshopId, photoId))) keys.push(key)
  await store.remove(keys)
}
