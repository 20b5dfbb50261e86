import { and, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { photos } from '#server/db/tables'
import { Problem } from '#shared/errors/problem'
import type { PhotoChange, PhotoView } from '#shared/photos/photo-view'
import { viewOf } from './photo-view'

/** Changes the words that stand for a photo where it cannot be seen. */
export async function changePhoto(ctx: Ctx, photoId: string, change: PhotoChange): Promise<PhotoView> {
  assertMay(ctx, 'photo:add')
  return inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.update(photos).set({ alt: change.alt })
      .where(and(eq(photos.id, photoId), eq(photos.workshopId, tx.workshopId))).returning()
    if (!row) throw new Problem({ code: 'photo/not-found' })
    return viewOf(tx, row)
  })
}
