import { z } from 'zod'
import type { Owner } from './bench-device'
import { PRIVATE_CACHES } from './empty-device'

/** Photos of a finish that lie on the tablet with a run, at most. */
export const RUN_PHOTOS_MAX = 12
/** Long edge of their copies, pixels: sharp enough to hold a piece beside, small enough to keep. */
export const RUN_PHOTO_EDGE = 640
/** Bytes of all of them together, at most. */
export const RUN_PHOTOS_BYTES_MAX = 4 * 1024 * 1024

/** A photo that shows how a piece should look. */
export const RunPhotoNote = z.object({ id: z.uuid(), words: z.string() })
export type RunPhotoNote = z.output<typeof RunPhotoNote>

/** Photos of one run's finish, on this tablet. */
export interface RunPhotoShelf {
  /** Those that lie here whole, in the order they were wished for. */
  read: () => Promise<{ note: RunPhotoNote, file: Blob }[]>
  /**
   * Brings what is not here yet, as far as number and bytes allow, and lets go of what is wished for no more.
   * A photo that cannot be had stops no other.
   */
  bring: (wished: readonly RunPhotoNote[], fetchPhoto: (photoId: string) => Promise<Blob>) => Promise<void>
}

/** The photos of a run for one person: in a cache of its own that signing out empties. */
export function runPhotoShelf({ personId, workshopId }: Owner, runId: string, store: CacheStorage = caches): RunPhotoShelf {
  const open = () => store.open(`${PRIVATE_CACHES}${personId}-${workshopId}-${runId}`)
  const placeOf = (photoId: string) => `/kept/photos/${photoId}`
  const LIST = '/kept/photos'

  return {
    async read() {
      const cache = await open()
      const list = z.array(RunPhotoNote).safeParse(await (await cache.match(LIST))?.json())
      const found = await Promise.all((list.data ?? []).map(async note => ({ note, file: await (await cache.match(placeOf(note.id)))?.blob() })))
      return found.flatMap(({ note, file }) => file ? [{ note, file }] : [])
    },
    async bring(wished, fetchPhoto) {
      const cache = await open()
      const notes = wished.slice(0, RUN_PHOTOS_MAX)
      let bytes = 0
      const kept: RunPhotoNote[] = []
      for (const note of notes) {
        const here = await (await cache.match(placeOf(note.id)))?.blob()
        const file = here ?? await fetchPhoto(note.id).catch(() => undefined)
        if (!file || bytes + file.size > RUN_PHOTOS_BYTES_MAX) continue
        if (!here) await cache.put(placeOf(note.id), new Response(file))
        bytes += file.size
        kept.push(note)
        // Written as it grows: what is here is shown, whenever the network goes.
        await cache.put(LIST, Response.json(kept))
      }
      await cache.put(LIST, Response.json(kept))
      const wanted = new Set(kept.map(note => placeOf(note.id)))
      for (const { url } of await cache.keys()) {
        const { pathname } = new URL(url)
        if (pathname !== LIST && !wanted.has(pathname)) await cache.delete(pathname)
      }
    },
  }
}
