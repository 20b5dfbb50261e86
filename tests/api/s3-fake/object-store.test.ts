import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { openObjectStore } from '#server/photos/object-store'
import type { ObjectStore } from '#server/photos/object-store'
import { BUCKET, KEYS, openFake, photo } from './fake'

let fake: Awaited<ReturnType<typeof openFake>>
let store: ObjectStore
beforeAll(async () => {
  fake = await openFake()
  store = openObjectStore({ endpoint: fake.endpoint, bucket: BUCKET, ...KEYS })
})
afterAll(async () => {
  store.close()
  await fake.close()
})

const keysUnder = async (prefix: string) => {
  const keys: string[] = []
  for await (const { key } of store.list(prefix)) keys.push(key)
  return keys
}

describe('the place where photos are kept', () => {
  it('gives back what it was given', async () => {
    const bytes = photo(50_000)
    await store.put('w/1/photo.webp', bytes, 'image/webp')
    const kept = await store.get('w/1/photo.webp')
    expect(kept?.contentType).toBe('image/webp')
    expect(Buffer.compare(kept?.bytes ?? new Uint8Array(), bytes)).toBe(0)
    expect(await store.has('w/1/photo.webp')).toBe(true)
  })

  it('has nothing where nothing was put', async () => {
    expect(await store.get('w/nothing')).toBeUndefined()
    expect(await store.has('w/nothing')).toBe(false)
  })

  it('lists more than one page and forgets more than one page', async () => {
    const keys = Array.from({ length: 1203 }, (_, n) => `many/${String(n).padStart(4, '0')}`)
    for (let from = 0; from < keys.length; from += 50) {
      await Promise.all(keys.slice(from, from + 50).map(key => store.put(key, new Uint8Array([1]), 'image/png')))
    }
    expect(await keysUnder('many/')).toEqual(keys)
    await store.remove([...keys, 'many/never-there'])
    expect(await keysUnder('many/')).toEqual([])
  })

  it('says so when it cannot be reached, instead of having nothing', async () => {
    const wrong = openObjectStore({ endpoint: fake.endpoint, bucket: BUCKET, ...KEYS, secretAccessKey: 'guessed' })
    await expect(wrong.get('w/1/photo.webp')).rejects.toThrow('signature')
    await expect(wrong.has('w/1/photo.webp')).rejects.toThrow()
    wrong.close()
  })
})
