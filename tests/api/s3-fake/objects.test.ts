import { Readable } from 'node:stream'
import {
  CopyObjectCommand, DeleteObjectCommand, DeleteObjectsCommand, GetObjectCommand, HeadBucketCommand, HeadObjectCommand,
  ListObjectsV2Command, PutObjectCommand,
} from '@aws-sdk/client-s3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startObjectServer } from '../../../docker-less-s3-fake/server'
import { BUCKET, KEYS, openFake, photo, refusalOf } from './fake'

let fake: Awaited<ReturnType<typeof openFake>>
beforeAll(async () => {
  fake = await openFake()
})
afterAll(() => fake.close())

const put = (Key: string, Body: Uint8Array | string, more = {}) =>
  fake.client().send(new PutObjectCommand({ Bucket: BUCKET, Key, Body, ...more }))
const read = async (Key: string, more = {}) => {
  const found = await fake.client().send(new GetObjectCommand({ Bucket: BUCKET, Key, ...more }))
  return { ...found, bytes: await found.Body?.transformToByteArray() }
}

describe('objects in the local store', () => {
  it('come back byte for byte, with their type and their words', async () => {
    const body = photo(200_000)
    await put('a.webp', body, { ContentType: 'image/webp', CacheControl: 'max-age=60', Metadata: { piece: '7' } })
    const found = await read('a.webp', { ChecksumMode: 'ENABLED' })
    expect(found).toMatchObject({ ContentType: 'image/webp', CacheControl: 'max-age=60', Metadata: { piece: '7' }, ContentLength: 200_000 })
    expect(found.ChecksumCRC32).toMatch(/=$/)
    expect(Buffer.compare(found.bytes ?? new Uint8Array(), body)).toBe(0)
  })

  it('come back whole when they were streamed, signed chunk or not', async () => {
    const body = photo(700_001)
    for (const requestChecksumCalculation of ['WHEN_SUPPORTED', 'WHEN_REQUIRED'] as const) {
      await fake.client({ requestChecksumCalculation }).send(new PutObjectCommand({
        Bucket: BUCKET, Key: 'streamed', Body: Readable.from([body.subarray(0, 99_999), body.subarray(99_999)]), ContentLength: body.length,
      }))
      const found = await read('streamed')
      expect(Buffer.compare(found.bytes ?? new Uint8Array(), body)).toBe(0)
      expect(found.ContentEncoding).toBeUndefined()
    }
  })

  it.each(['CRC32', 'CRC32C', 'SHA1', 'SHA256'] as const)('are checked by %s and keep it', async (ChecksumAlgorithm) => {
    await put('summed', 'pearl over black', { ChecksumAlgorithm })
    const head = await fake.client().send(new HeadObjectCommand({ Bucket: BUCKET, Key: 'summed', ChecksumMode: 'ENABLED' }))
    expect(head[`Checksum${ChecksumAlgorithm}`]).toBeTruthy()
  })

  it.each([
    ['a wrong CRC32', { ChecksumCRC32: 'AAAAAA==' }],
    ['a wrong CRC32C', { ChecksumCRC32C: 'AAAAAA==' }],
    ['a wrong SHA-1', { ChecksumSHA1: Buffer.alloc(20).toString('base64') }],
    ['a wrong SHA-256', { ChecksumSHA256: Buffer.alloc(32).toString('base64') }],
    ['a wrong MD5', { ContentMD5: Buffer.alloc(16).toString('base64') }],
  ])('are refused with %s and leave what was there', async (_, sum) => {
    await put('guarded', 'first')
    expect(await refusalOf(put('guarded', 'second', sum))).toBe('BadDigest 400')
    expect(Buffer.from((await read('guarded')).bytes ?? []).toString()).toBe('first')
  })

  it('keep any key apart, however it is spelt', async () => {
    const keys = ['Döbel & <Barsch> 🐟.png', 'a/../b', '../../up', '/leading', 'plus+and space', 'per%cent', 'new\nline', 'tail/', '日本/鱒 ~*\'().jpg']
    for (const key of keys) await put(`odd/${key}`, key)
    for (const key of keys) expect(Buffer.from((await read(`odd/${key}`)).bytes ?? []).toString()).toBe(key)
    const listed = await fake.client().send(new ListObjectsV2Command({ Bucket: BUCKET, Prefix: 'odd/' }))
    expect(listed.Contents?.map(one => one.Key).toSorted()).toEqual(keys.map(key => `odd/${key}`).toSorted())
  })

  it.each([
    ['bytes=2-4', '234', 'bytes 2-4/10'],
    ['bytes=7-', '789', 'bytes 7-9/10'],
    ['bytes=-2', '89', 'bytes 8-9/10'],
    ['bytes=8-99', '89', 'bytes 8-9/10'],
  ])('give the stretch %s', async (Range, text, ContentRange) => {
    await put('digits', '0123456789')
    const found = await read('digits', { Range })
    expect([Buffer.from(found.bytes ?? []).toString(), found.ContentRange]).toEqual([text, ContentRange])
  })

  it('refuse a stretch behind their end', async () => {
    await put('digits', '0123456789')
    expect(await refusalOf(read('digits', { Range: 'bytes=10-' }))).toBe('InvalidRange 416')
  })

  it('may be empty', async () => {
    await put('empty', new Uint8Array())
    expect((await read('empty')).ContentLength).toBe(0)
  })

  it('answer to conditions', async () => {
    const { ETag } = await put('conditional', 'one')
    expect(await refusalOf(put('conditional', 'two', { IfNoneMatch: '*' }))).toBe('PreconditionFailed 412')
    expect(await refusalOf(put('conditional', 'two', { IfMatch: '"0"' }))).toBe('PreconditionFailed 412')
    expect(await refusalOf(read('conditional', { IfMatch: '"0"' }))).toBe('PreconditionFailed 412')
    expect(await refusalOf(read('conditional', { IfNoneMatch: ETag }))).toMatch(/304$/)
    expect(await refusalOf(put('conditional', 'two', { IfMatch: ETag }))).toBe('let in')
  })

  it('let one of many writers make a new key', async () => {
    const tries = await Promise.all(Array.from({ length: 8 }, (_, n) => refusalOf(put('once', `writer ${n}`, { IfNoneMatch: '*' }))))
    expect(tries.filter(outcome => outcome === 'let in')).toHaveLength(1)
  })

  it('are copied with their words or with new ones', async () => {
    await put('copy/from ö', 'x', { ContentType: 'text/plain', Metadata: { a: '1' } })
    const CopySource = `${BUCKET}/${encodeURIComponent('copy/from ö')}`
    await fake.client().send(new CopyObjectCommand({ Bucket: BUCKET, Key: 'copy/to', CopySource }))
    await fake.client().send(new CopyObjectCommand({ Bucket: BUCKET, Key: 'copy/new', CopySource, MetadataDirective: 'REPLACE', Metadata: { b: '2' } }))
    expect((await read('copy/to')).Metadata).toEqual({ a: '1' })
    expect((await read('copy/new')).Metadata).toEqual({ b: '2' })
  })

  it('are gone when deleted, one or many, and deleting again is no error', async () => {
    for (const key of ['gone/1', 'gone/2', 'gone/3 &']) await put(key, 'x')
    await fake.client().send(new DeleteObjectCommand({ Bucket: BUCKET, Key: 'gone/1' }))
    await fake.client().send(new DeleteObjectsCommand({ Bucket: BUCKET, Delete: { Objects: ['gone/1', 'gone/2', 'gone/3 &'].map(Key => ({ Key })) } }))
    const left = await fake.client().send(new ListObjectsV2Command({ Bucket: BUCKET, Prefix: 'gone/' }))
    expect(left.KeyCount).toBe(0)
    expect(await refusalOf(read('gone/2'))).toBe('NoSuchKey 404')
    expect(await refusalOf(fake.client().send(new HeadObjectCommand({ Bucket: BUCKET, Key: 'gone/2' })))).toBe('NotFound 404')
  })

  it('are listed page by page in the order of their bytes, folders taken together', async () => {
    const keys = ['p/a', 'p/b/1', 'p/b/2', 'p/c', 'p/d/1', 'p/\uffee', 'p/😀']
    for (const key of keys) await put(key, 'x')
    const seen: string[] = []
    let ContinuationToken: string | undefined
    do {
      const page = await fake.client().send(new ListObjectsV2Command({ Bucket: BUCKET, Prefix: 'p/', Delimiter: '/', MaxKeys: 2, ContinuationToken }))
      expect(page.KeyCount).toBeLessThanOrEqual(2)
      seen.push(...(page.CommonPrefixes ?? []).map(one => one.Prefix ?? ''), ...(page.Contents ?? []).map(one => one.Key ?? ''))
      ContinuationToken = page.NextContinuationToken
    } while (ContinuationToken)
    expect(seen.toSorted()).toEqual(['p/a', 'p/b/', 'p/c', 'p/d/', 'p/\uffee', 'p/😀'].toSorted())
    const flat = await fake.client().send(new ListObjectsV2Command({ Bucket: BUCKET, Prefix: 'p/', StartAfter: 'p/b/1' }))
    expect(flat.Contents?.map(one => one.Key)).toEqual(['p/b/2', 'p/c', 'p/d/1', 'p/\uffee', 'p/😀'])
  })

  it('are refused beyond the longest body', async () => {
    const small = await openFake(1000)
    const send = (Body: Uint8Array | Readable, ContentLength: number) => small.client().send(new PutObjectCommand({ Bucket: BUCKET, Key: 'k', Body, ContentLength }))
    expect(await refusalOf(send(photo(1000), 1000))).toBe('let in')
    expect(await refusalOf(send(photo(1001), 1001))).toBe('EntityTooLarge 400')
    expect(await refusalOf(send(Readable.from([photo(3000)]), 3000))).toBe('EntityTooLarge 400')
    await small.close()
  })

  it('are still there after the store was stopped and started', async () => {
    await put('lasting', 'clear coat')
    const again = await startObjectServer({ root: fake.root, ...KEYS })
    const found = await fake.client({ endpoint: again.endpoint }).send(new GetObjectCommand({ Bucket: BUCKET, Key: 'lasting' }))
    expect(await found.Body?.transformToString()).toBe('clear coat')
    await again.close()
  })

  it('need a bucket that exists', async () => {
    expect(await refusalOf(fake.client().send(new HeadBucketCommand({ Bucket: BUCKET })))).toBe('let in')
    expect(await refusalOf(fake.client().send(new PutObjectCommand({ Bucket: 'nowhere', Key: 'k', Body: 'x' })))).toBe('NoSuchBucket 404')
  })
})
