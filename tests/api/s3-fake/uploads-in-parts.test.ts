import {
  AbortMultipartUploadCommand, CompleteMultipartUploadCommand, CreateMultipartUploadCommand, GetObjectCommand, UploadPartCommand,
} from '@aws-sdk/client-s3'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { BUCKET, openFake, photo, refusalOf } from './fake'

const PART = 5 * 1024 * 1024

let fake: Awaited<ReturnType<typeof openFake>>
beforeAll(async () => {
  fake = await openFake()
})
afterAll(() => fake.close())

async function begin(Key: string, bodies: Uint8Array[]) {
  const client = fake.client()
  const { UploadId } = await client.send(new CreateMultipartUploadCommand({ Bucket: BUCKET, Key, ContentType: 'image/tiff' }))
  const Parts: { PartNumber: number, ETag: string | undefined }[] = []
  for (const [index, Body] of bodies.entries()) {
    const { ETag } = await client.send(new UploadPartCommand({ Bucket: BUCKET, Key, UploadId, PartNumber: index + 1, Body }))
    Parts.push({ PartNumber: index + 1, ETag })
  }
  const complete = (parts = Parts) => client.send(new CompleteMultipartUploadCommand({ Bucket: BUCKET, Key, UploadId, MultipartUpload: { Parts: parts } }))
  const abort = () => client.send(new AbortMultipartUploadCommand({ Bucket: BUCKET, Key, UploadId }))
  return { Parts, complete, abort }
}

describe('an upload in parts', () => {
  it('becomes one object, in the order of its parts', async () => {
    const bodies = [photo(PART), photo(PART), photo(77)]
    const upload = await begin('large ö.tif', bodies)
    expect((await upload.complete()).ETag).toMatch(/^"[0-9a-f]{32}-3"$/)
    const found = await fake.client().send(new GetObjectCommand({ Bucket: BUCKET, Key: 'large ö.tif' }))
    expect(found.ContentType).toBe('image/tiff')
    expect(Buffer.concat(bodies).equals(await found.Body?.transformToByteArray() ?? new Uint8Array())).toBe(true)
    expect(await refusalOf(upload.complete())).toBe('NoSuchUpload 404')
  })

  it('is refused with parts out of order, unknown, changed or too small', async () => {
    const upload = await begin('parts', [photo(PART), photo(10)])
    expect(await refusalOf(upload.complete(upload.Parts.toReversed()))).toBe('InvalidPartOrder 400')
    expect(await refusalOf(upload.complete(upload.Parts.map(part => ({ ...part, ETag: '"0"' }))))).toBe('InvalidPart 400')
    expect(await refusalOf(upload.complete([{ PartNumber: 3, ETag: '"0"' }]))).toBe('InvalidPart 400')
    const small = await begin('small', [photo(10), photo(10)])
    expect(await refusalOf(small.complete())).toBe('EntityTooSmall 400')
  })

  it('leaves nothing when it is given up', async () => {
    const upload = await begin('given up', [photo(10)])
    await upload.abort()
    expect(await refusalOf(upload.complete())).toBe('NoSuchUpload 404')
    expect(await refusalOf(fake.client().send(new GetObjectCommand({ Bucket: BUCKET, Key: 'given up' })))).toBe('NoSuchKey 404')
  })
})
