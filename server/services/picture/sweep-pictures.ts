import { and, eq, inArray, lt, ne, or } from 'drizzle-orm'
import type { Database } from '#server/db/client'
import { pictures } from '#server/db/tables'
import type { ObjectStore } from '#server/photos/object-store'
import { DRAWN_BY, pictureOfKey } from '#server/pictures/picture-keys'
import { inTransactionAs } from '#server/services/in-transaction'

const HOUR = 3600 * 1000
/** While one server takes over from another, the older may still show what it has just drawn, ms. */
const YOUNG = HOUR
/** A picture nobody has drawn anew for so long is painted again should somebody ask, ms. */
const OLD = 90 * 24 * HOUR
/** Files forgotten in one go; what is left waits for the next. */
const MOST = 5000
/** Files the store takes away at once. */
const BATCH = 500

/**
 * Forgets pictures drawn by other versions, and those that have hung for long: their files and what is known of them.
 * Several processes doing it at once do no harm. Answers how many files it forgot.
 */
export async function sweepPictures(db: Database, store: ObjectStore, now: Date, most: number = MOST): Promise<number> {
  const byWorkshop = new Map<string, { hashes: Set<string>, keys: string[] }>()
  let found = 0
  for await (const { key, modifiedAt } of store.list('workshops/')) {
    const picture = pictureOfKey(key)
    const age = now.getTime() - modifiedAt.getTime()
    if (!picture || age < (picture.drawnBy === DRAWN_BY ? OLD : YOUNG)) continue
    const of = byWorkshop.get(picture.workshopId) ?? { hashes: new Set<string>(), keys: [] }
    byWorkshop.set(picture.workshopId, of)
    of.hashes.add(picture.hash)
    of.keys.push(key)
    if (++found >= most) break
  }
  for (const [workshopId, { hashes, keys }] of byWorkshop) {
    // What is known goes first: a picture without its file would be looked for in vain.
    await inTransactionAs(db, { workshopId }, tx => tx.delete(pictures).where(and(
      eq(pictures.workshopId, workshopId), inArray(pictures.hash, [...hashes]),
      or(ne(pictures.engineVersion, DRAWN_BY), lt(pictures.createdAt, new Date(now.getTime() - OLD))),
    )))
    for (let at = 0; at < keys.length; at += BATCH) await store.remove(keys.slice(at, at + BATCH))
  }
  return found
}
