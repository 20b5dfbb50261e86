import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import type { ObjectStore, StoredObject } from '#server/photos/object-store'
import { photoKeys } from '#server/photos/photo-keys'
import { Problem } from '#shared/errors/problem'
import { photoInWorkshop } from './photo-view'

/** One copy of a photo for a member of its workshop. */
export async function getPhotoFile(ctx: Ctx, photoId: string, file: string, store: ObjectStore): Promise<StoredObject> {
  assertMay(ctx, 'photo:read')
  await inTransaction(ctx, tx => photoInWorkshop(tx, photoId))
  const found = await store.get(photoKeys.rendition(ctx.workshopId, photoId, file))
  if (!found) throw new Problem({ code: 'photo/not-found' })
  return found
}
