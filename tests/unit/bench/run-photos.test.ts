import { describe, expect, it } from 'vitest'
import { RUN_PHOTOS_BYTES_MAX, RUN_PHOTOS_MAX, runPhotoShelf } from '~/bench/device/run-photos'
import { photosToBring } from '#shared/bench/photos-to-bring'

const uuid = (n: number) => `aaaaaaaa-0000-4000-8000-${String(n).padStart(12, '0')}`
const OWNER = { personId: uuid(1), workshopId: uuid(2) }
const notes = (...numbers: number[]) => numbers.map(n => ({ id: uuid(n), words: `Photo ${n}` }))
const photo = (bytes = 10) => Promise.resolve(new Blob([new Uint8Array(bytes)]))

/** A browser's caches, as far as the shelf needs them. */
function memoryCaches(): CacheStorage {
  const all = new Map<string, Map<string, Response>>()
  const cacheOf = (held: Map<string, Response>) => ({
    match: (key: string) => Promise.resolve(held.get(key)?.clone()),
    put: (key: string, answer: Response) => Promise.resolve(void held.set(key, answer)),
    delete: (key: string) => Promise.resolve(held.delete(key)),
    keys: () => Promise.resolve([...held.keys()].map(key => new Request(`http://tablet${key}`))),
  })
  const store = {
    open(name: string) {
      const held = all.get(name) ?? new Map<string, Response>()
      all.set(name, held)
      return Promise.resolve(cacheOf(held))
    },
  }
  // Only what the shelf asks of it is here.
  return store as unknown as CacheStorage
}

describe('photos of a finish on the tablet', () => {
  it('lie there without a network once they were brought, and go when they are wished for no more', async () => {
    const shelf = runPhotoShelf(OWNER, uuid(3), memoryCaches())
    await shelf.bring(notes(1, 2), () => photo())
    expect((await shelf.read()).map(each => each.note.words)).toEqual(['Photo 1', 'Photo 2'])
    await shelf.bring(notes(2, 3), id => id === uuid(2) ? Promise.reject(new Error('it lies here already')) : photo())
    expect((await shelf.read()).map(each => each.note.id)).toEqual([uuid(2), uuid(3)])
  })

  it('take no more room than they may, and one that cannot be had stops no other', async () => {
    const shelf = runPhotoShelf(OWNER, uuid(3), memoryCaches())
    await shelf.bring(notes(1, 2, 3, 4), id => id === uuid(1) ? Promise.reject(new TypeError('gone')) : photo(RUN_PHOTOS_BYTES_MAX / 2 - 1))
    expect((await shelf.read()).map(each => each.note.id)).toEqual([uuid(2), uuid(3)])
    await shelf.bring(notes(...Array.from({ length: 30 }, (_, n) => n + 10)), () => photo())
    expect(await shelf.read()).toHaveLength(RUN_PHOTOS_MAX)
  })

  it('are another person\'s nowhere', async () => {
    const store = memoryCaches()
    await runPhotoShelf(OWNER, uuid(3), store).bring(notes(1), () => photo())
    expect(await runPhotoShelf({ ...OWNER, personId: uuid(9) }, uuid(3), store).read()).toEqual([])
  })
})

it('brings the sample\'s photo first, then the finish, then the newest earlier run, and none of the run itself', () => {
  const of = (n: number, run: number | null, alt = '') => ({ id: uuid(n), run: run === null ? null : { id: uuid(100 + run), number: run }, alt })
  expect(photosToBring([of(1, 4), of(2, null, 'left side'), of(3, 5), of(4, 7), of(5, 7)], uuid(107), uuid(5))).toEqual([
    { id: uuid(5), words: 'The sample' }, { id: uuid(2), words: 'The finish: left side' }, { id: uuid(3), words: 'Run 5' }, { id: uuid(1), words: 'Run 4' },
  ])
})
