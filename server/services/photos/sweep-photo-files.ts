import { inArray } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { inTransactionAs } from '#server/services/in-transaction'
import { photos } from '#server/db/tables'
import type { ObjectStore } from '#server/photos/object-store'
import { photoOfKey } from '#server/photos/photo-keys'

/** Files this young may belong to a photo that is being taken in just now, ms. */
const YOUNG = 24 * 3600 * 1000

/**
 * Forgets the files of photos that are no more: their workshop or scheme went, or taking them in broke off.
 * Several processes doing it at once do no harm. Answers how many files it forgot.
 */
export async function sweepPhotoFiles(db: Database, store: ObjectStore, now: Date): Promise<number> {
  const byWorkshop = new Map<string, Map<string, string[]>>()
  for await (const { key, modifiedAt } of store.list('workshops/')) {
    const of = photoOfKey(key)
    if (!of || now.getTime() - modifiedAt.getTime() < YOUNG) continue
    const found = byWorkshop.get(of.workshopId) ?? new Map<string, string[]>()
    byWorkshop.set(of.workshopId, found.set(of.photoId, [...found.get(of.photoId) ?? [], key]))
  }
  let forgotten = 0
  for (const [workshopId, found] of byWorkshop) {
    const kept = await inTransactionAs(db, { workshopId }, tx => tx.select({ id: photos.id }).from(photos).where(inArray(photos.id, [...found.keys()])))
    const known = new Set(kept.map(photo => photo.id))
    const left = [...found].flatMap(([photoId, keys]) => known.has(photoId) ? [] : keys)
    if (left.length > 0) await store.remove(left)
    forgotten += left.length
  }
  return forgotten
}
