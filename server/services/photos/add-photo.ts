import { createHash, randomUUID } from 'node:crypto'
import { and, count, eq, max } from 'drizzle-orm'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { photos, runs } from '#server/db/tables'
import type { ObjectStore } from '#server/photos/object-store'
import { photoKeys } from '#server/photos/photo-keys'
import { PhotoRefused, type ProcessedPhoto } from '#server/photos/process-photo'
import { Problem } from '#shared/errors/problem'
import { PHOTO_BYTES_MAX, PHOTO_PIXELS_MAX, PHOTOS_PER_SCHEME_MAX } from '#shared/photos/photo-limits'
import type { PhotoView } from '#shared/photos/photo-view'
import { assertSchemeHere, holdPhotosOf } from './photo-place'
import { type PhotoRow, viewOf } from './photo-view'
import { removePhotoFiles } from './remove-photo-files'

/** What taking a photo in needs from outside: the store, and the bounded workshop where it is decoded. */
export interface PhotoTools { store: ObjectStore, process: (bytes: Uint8Array) => Promise<ProcessedPhoto> }

/** Takes a camera file in as a photo of a scheme, under the id a tablet gave it if it did. The same file again, or the same id, is the same photo. */
export async function addPhoto(ctx: Ctx, schemeId: string, runId: string | null, bytes: Uint8Array, tools: PhotoTools, ownId?: string): Promise<PhotoView> {
  assertMay(ctx, 'photo:add')
  const sha256 = createHash('sha256').update(bytes).digest('hex')
  const already = await inTransaction(ctx, async (tx) => {
    await assertSchemeHere(tx, schemeId)
    const same = await sameFile(tx, schemeId, sha256) ?? await sameId(tx, schemeId, ownId)
    if (same) return viewOf(tx, same)
    await assertRoom(tx, schemeId)
    await assertRun(tx, schemeId, runId)
    return undefined
  })
  if (already) return already

  const photo = await processed(bytes, tools)
  const id = ownId ?? randomUUID()
  // Files first, row last: a photo that can be seen is whole.
  try {
    await tools.store.put(photoKeys.original(ctx.workshopId, id), bytes, 'application/octet-stream')
    for (const { file, contentType, bytes: copy } of photo.renditions)
      await tools.store.put(photoKeys.rendition(ctx.workshopId, id, file), copy, contentType)
    const added = await inTransaction(ctx, async (tx) => {
      await holdPhotosOf(tx, schemeId)
      const same = await sameFile(tx, schemeId, sha256)
      if (same) return viewOf(tx, same)
      await assertRoom(tx, schemeId)
      const [row] = await tx.db.insert(photos).values({
        id, workshopId: tx.workshopId, schemeId, runId, sha256, format: photo.format, bytes: bytes.byteLength,
        width: photo.width, height: photo.height, position: await nextPosition(tx, schemeId), addedBy: tx.personId,
      }).returning()
      return viewOf(tx, row!)
    })
    // Somebody sent the same file at the same time: theirs is the photo, and these copies are nobody's.
    if (added.id !== id) await removePhotoFiles(ctx.workshopId, id, tools.store)
    return added
  }
  catch (error) {
    // What cannot be taken back now is swept later: no row names it. Under an id of the tablet's own another sending may be under way.
    if (ownId === undefined) await removePhotoFiles(ctx.workshopId, id, tools.store).catch(() => undefined)
    throw error
  }
}

const ofScheme = (tx: Ctx, schemeId: string) => and(eq(photos.workshopId, tx.workshopId), eq(photos.schemeId, schemeId))

async function sameFile(tx: Ctx, schemeId: string, sha256: string): Promise<PhotoRow | undefined> {
  const [row] = await tx.db.select().from(photos).where(and(ofScheme(tx, schemeId), eq(photos.sha256, sha256)))
  return row
}

async function sameId(tx: Ctx, schemeId: string, id: string | undefined): Promise<PhotoRow | undefined> {
  if (id === undefined) return undefined
  const [row] = await tx.db.select().from(photos).where(and(eq(photos.workshopId, tx.workshopId), eq(photos.id, id)))
  if (row && row.schemeId !== schemeId) throw new Problem({ code: 'photo/not-found' })
  return row
}

async function assertRoom(tx: Ctx, schemeId: string): Promise<void> {
  const [many] = await tx.db.select({ n: count() }).from(photos).where(ofScheme(tx, schemeId))
  if (many!.n >= PHOTOS_PER_SCHEME_MAX) throw new Problem({ code: 'photo/too-many', max: PHOTOS_PER_SCHEME_MAX })
}

async function assertRun(tx: Ctx, schemeId: string, runId: string | null): Promise<void> {
  if (runId === null) return
  const [run] = await tx.db.select({ id: runs.id }).from(runs)
    .where(and(eq(runs.id, runId), eq(runs.workshopId, tx.workshopId), eq(runs.schemeId, schemeId)))
  if (!run) throw new Problem({ code: 'run/not-found' })
}

async function nextPosition(tx: Ctx, schemeId: string): Promise<number> {
  const [last] = await tx.db.select({ position: max(photos.position) }).from(photos).where(ofScheme(tx, schemeId))
  return (last?.position ?? -1) + 1
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
