import { createHash, randomUUID } from 'node:crypto'
import { and, count, eq } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { photos, runs, schemes } from '#server/db/tables'
import type { ObjectStore } from '#server/photos/object-store'
import { photoKeys } from '#server/photos/photo-keys'
import { PhotoRefused, type ProcessedPhoto } from '#server/photos/process-photo'
import { Problem } from '#shared/errors/problem'
import { PHOTO_BYTES_MAX, PHOTO_PIXELS_MAX, PHOTOS_PER_SCHEME_MAX } from '#shared/photos/photo-limits'
import type { PhotoView } from '#shared/photos/photo-view'
import { photoView } from './photo-view'

/** What taking a photo in needs from outside: the store, and the bounded workshop where it is decoded. */
export interface PhotoTools { store: ObjectStore, process: (bytes: Uint8Array) => Promise<ProcessedPhoto> }

/** Takes a camera file in as a photo of a scheme. The same file again is the same photo. */
export async function addPhoto(ctx: Ctx, schemeId: string, runId: string | null, bytes: Uint8Array, tools: PhotoTools): Promise<PhotoView> {
  assertMay(ctx, 'photo:add')
  const sha256 = createHash('sha256').update(bytes).digest('hex')
  const already = await inTransaction(ctx, async (tx) => {
    await assertPlace(tx, schemeId, runId)
    const [row] = await tx.db.select().from(photos)
      .where(and(eq(photos.workshopId, tx.workshopId), eq(photos.schemeId, schemeId), eq(photos.sha256, sha256)))
    return row
  })
  if (already) return photoView(already)

  const photo = await processed(bytes, tools)
  // Files first, row last: a photo that can be seen is whole; what a failure leaves behind has no row and is swept.
  const id = randomUUID()
  await tools.store.put(photoKeys.original(ctx.workshopId, id), bytes, 'application/octet-stream')
  for (const { file, contentType, bytes: copy } of photo.renditions)
    await tools.store.put(photoKeys.rendition(ctx.workshopId, id, file), copy, contentType)

  return inTransaction(ctx, async (tx) => {
    const [many] = await tx.db.select({ n: count() }).from(photos).where(and(eq(photos.workshopId, tx.workshopId), eq(photos.schemeId, schemeId)))
    const [row] = await tx.db.insert(photos).values({
      id, workshopId: tx.workshopId, schemeId, runId, sha256, format: photo.format, bytes: bytes.byteLength,
      width: photo.width, height: photo.height, position: many!.n, addedBy: tx.personId,
    }).returning()
    return photoView(row!)
  })
}

async function assertPlace(tx: Ctx, schemeId: string, runId: string | null): Promise<void> {
  const [scheme] = await tx.db.select({ id: schemes.id }).from(schemes).where(and(eq(schemes.id, schemeId), eq(schemes.workshopId, tx.workshopId)))
  if (!scheme) throw new Problem({ code: 'scheme/not-found' })
  const [many] = await tx.db.select({ n: count() }).from(photos).where(and(eq(photos.workshopId, tx.workshopId), eq(photos.schemeId, schemeId)))
  if (many!.n >= PHOTOS_PER_SCHEME_MAX) throw new Problem({ code: 'photo/too-many', max: PHOTOS_PER_SCHEME_MAX })
  if (runId === null) return
  const [run] = await tx.db.select({ id: runs.id }).from(runs)
    .where(and(eq(runs.id, runId), eq(runs.workshopId, tx.workshopId), eq(runs.schemeId, schemeId)))
  if (!run) throw new Problem({ code: 'run/not-found' })
}

async function processed(bytes: Uint8Array, tools: PhotoTools): Promise<ProcessedPhoto> {
  try {
    return await tools.process(bytes)
  }
  catch (error) {
    if (!(error instanceof PhotoRefused)) throw error
    throw new Problem(error.code === 'photo/too-large'
      ? { code: error.code, maxBytes: PHOTO_BYTES_MAX, maxPixels: PHOTO_PIXELS_MAX }
      : { code: error.code })
  }
}
