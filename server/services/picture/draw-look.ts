import { createHash } from 'node:crypto'
import { and, eq } from 'drizzle-orm'
import { pictures } from '#server/db/tables'
import { encodePicture, type PictureFormat } from '#server/pictures/encode-picture'
import { paintOnThread } from '#server/pictures/painting-threads'
import { objectStore, type StoredObject } from '#server/photos/object-store'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import type { Look } from '#shared/picture/look'
import { pictureText } from '#shared/picture/picture-hash'
import type { PictureWish } from '#shared/picture/picture-options'

/** A picture of a look as a file, and the hash of everything it shows. */
export interface DrawnLook extends StoredObject { hash: string }

/** Pictures being painted right now, by workshop and hash: asked for twice, a picture is painted once. */
const underWay = new Map<string, Promise<DrawnLook>>()

/**
 * A picture of a look as a file: painted once for all who ask, then out of the store.
 * Who may see the look is the caller's to know; a look only ever comes from the acting workshop.
 */
export async function drawLook(ctx: Ctx, look: Look, wish: PictureWish, format: PictureFormat = 'webp'): Promise<DrawnLook> {
  assertMay(ctx, 'scheme:look')
  const hash = createHash('sha256').update(`${format}\n${pictureText(look, wish)}`).digest('hex')
  const key = `${ctx.workshopId}/${hash}`
  const running = underWay.get(key)
  if (running) return running

  const drawing = storedOrPainted(ctx, look, wish, format, hash).finally(() => underWay.delete(key))
  underWay.set(key, drawing)
  return drawing
}

async function storedOrPainted(ctx: Ctx, look: Look, wish: PictureWish, format: PictureFormat, hash: string): Promise<DrawnLook> {
  const known = await objectKeyOf(ctx, hash)
  const stored = known === undefined ? undefined : await objectStore().get(known)
  if (stored) return { ...stored, hash }

  const bytes = await encodePicture(await paintOnThread({ look, wish }), format)
  const contentType = `image/${format}`
  const objectKey = `workshops/${ctx.workshopId}/pictures/${hash}.${format}`
  await objectStore().put(objectKey, bytes, contentType)
  if (known === undefined) {
    await inTransaction(ctx, tx => tx.db.insert(pictures).values({ hash, workshopId: tx.workshopId, engineVersion: ENGINE_VERSION, objectKey }))
  }
  return { bytes, contentType, etag: `"${hash}"`, hash }
}

async function objectKeyOf(ctx: Ctx, hash: string): Promise<string | undefined> {
  return inTransaction(ctx, async (tx) => {
    const [row] = await tx.db.select({ objectKey: pictures.objectKey }).from(pictures)
      .where(and(eq(pictures.workshopId, tx.workshopId), eq(pictures.hash, hash)))
    return row?.objectKey
  })
}
