import { createHash } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import { pictures } from '#server/db/tables'
import { encodePicture, type PictureFormat } from '#server/pictures/encode-picture'
import { paintOnThread } from '#server/pictures/painting-threads'
import { DRAWN_BY, pictureKey } from '#server/pictures/picture-keys'
import { pictureQueue } from '#server/pictures/picture-queue'
import { objectStore, type StoredObject } from '#server/photos/object-store'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import type { Look } from '#shared/picture/look'
import { pictureText } from '#shared/picture/picture-hash'
import type { PictureWish } from '#shared/picture/picture-options'

/** A picture of a look as a file, and the hash of everything it shows. */
export interface DrawnLook extends StoredObject { hash: string }

/** About a minute's work of two threads; a large wall that is seen for the first time has room. */
const queue = pictureQueue<DrawnLook>({ all: 200, each: 120 })

/**
 * A picture of a look as a file: painted once for all who ask, then out of the store.
 * Who may see the look is the caller's to know; a look only ever comes from the acting workshop.
 */
export async function drawLook(ctx: Ctx, look: Look, wish: PictureWish, format: PictureFormat = 'webp'): Promise<DrawnLook> {
  assertMay(ctx, 'scheme:look')
  const hash = createHash('sha256').update(`${format}\n${pictureText(look, wish)}`).digest('hex')
  const known = await storedPicture(ctx, hash)
  if (known.stored) return { ...known.stored, hash }
  return queue.join(ctx.workshopId, hash, () => painted(ctx, look, wish, format, hash))
}

async function painted(ctx: Ctx, look: Look, wish: PictureWish, format: PictureFormat, hash: string): Promise<DrawnLook> {
  // Somebody else may have painted it since it was looked for.
  const { stored, isKnown } = await storedPicture(ctx, hash)
  if (stored) return { ...stored, hash }
  const bytes = await encodePicture(await paintOnThread({ look, wish }), format)
  const contentType = `image/${format}`
  const objectKey = pictureKey(ctx.workshopId, hash, format)
  await objectStore().put(objectKey, bytes, contentType)
  if (!isKnown) {
    await inTransaction(ctx, tx => tx.db.insert(pictures).values({ hash, workshopId: tx.workshopId, engineVersion: DRAWN_BY, objectKey }))
  }
  return { bytes, contentType, etag: `"${hash}"`, hash }
}

async function storedPicture(ctx: Ctx, hash: string): Promise<{ isKnown: boolean, stored: StoredObject | undefined }> {
  const objectKey = await inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.select({ objectKey: pictures.objectKey }).from(pictures)
      .where(and(eq(pictures.workshopId, tx.workshopId), eq(pictures.hash, hash)))
    return row?.objectKey
  })
  return { isKnown: objectKey !== undefined, stored: objectKey === undefined ? undefined : await objectStore().get(objectKey) }
}
