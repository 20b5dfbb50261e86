import { GetObjectCommand, PutObjectCommand } from '@aws-sdk/client-s3'
import { createPresignedPost } from '@aws-sdk/s3-presigned-post'
import { getSignedUrl } from '@aws-sdk/s3-request-presigner'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { BUCKET, KEYS, openFake, photo, refusalOf } from './fake'

let fake: Awaited<ReturnType<typeof openFake>>
beforeAll(async () => {
  fake = await openFake()
})
afterAll(() => fake.close())

const signer = () => fake.client({ requestChecksumCalculation: 'WHEN_REQUIRED' })
const statusOf = async (response: Promise<Response>) => {
  const { status, text } = await response.then(async got => ({ status: got.status, text: await got.text() }))
  return `${status} ${/<Code>(.*)<\/Code>/.exec(text)?.[1] ?? ''}`.trim()
}
const changed = (url: string, change: (url: URL) => void) => {
  const made = new URL(url)
  change(made)
  return made.href
}

describe('the door of the local store', () => {
  it('is shut to a wrong secret, a wrong key, a wrong region and a wrong clock', async () => {
    const ask = (more: Parameters<typeof fake.client>[0]) => refusalOf(fake.client(more).send(new GetObjectCommand({ Bucket: BUCKET, Key: 'none' })))
    expect(await ask({ credentials: { ...KEYS, secretAccessKey: 'guessed' } })).toBe('SignatureDoesNotMatch 403')
    expect(await ask({ credentials: { ...KEYS, accessKeyId: 'AKIASTRANGER' } })).toBe('AccessDenied 403')
    expect(await ask({ region: 'eu-central-1' })).toBe('AccessDenied 403')
    expect(await ask({ systemClockOffset: -3_600_000 })).toBe('RequestTimeTooSkewed 403')
    expect(await ask({})).toBe('NoSuchKey 404')
  })

  it('is shut to anyone without a signature', async () => {
    await fake.client().send(new PutObjectCommand({ Bucket: BUCKET, Key: 'private', Body: 'recipe' }))
    for (const method of ['GET', 'HEAD', 'PUT', 'DELETE', 'POST']) {
      expect(await statusOf(fetch(`${fake.endpoint}/${BUCKET}/private`, { method }))).toMatch(/^403/)
    }
    expect(await statusOf(fetch(`${fake.endpoint}/`))).toBe('403 AccessDenied')
  })

  it('lets a presigned GET in, as it was signed and while it lasts', async () => {
    await fake.client().send(new PutObjectCommand({ Bucket: BUCKET, Key: 'shown ö', Body: 'face and flop' }))
    const command = new GetObjectCommand({ Bucket: BUCKET, Key: 'shown ö', ResponseContentDisposition: 'attachment; filename="a.txt"' })
    const url = await getSignedUrl(signer(), command, { expiresIn: 60 })
    const got = await fetch(url)
    expect([await got.text(), got.headers.get('content-disposition')]).toEqual(['face and flop', 'attachment; filename="a.txt"'])
    expect(await statusOf(fetch(changed(url, u => u.searchParams.set('X-Amz-Expires', '600'))))).toBe('403 SignatureDoesNotMatch')
    expect(await statusOf(fetch(changed(url, (u) => {
      u.pathname = `/${BUCKET}/private`
    })))).toBe('403 SignatureDoesNotMatch')
    expect(await statusOf(fetch(url, { method: 'DELETE' }))).toBe('403 SignatureDoesNotMatch')
  })

  it('shuts on a presigned address that has expired', async () => {
    const old = new Date(Date.now() - 120_000)
    const url = await getSignedUrl(signer(), new GetObjectCommand({ Bucket: BUCKET, Key: 'private' }), { expiresIn: 60, signingDate: old })
    const got = await fetch(url)
    expect([got.status, await got.text()]).toEqual([403, expect.stringContaining('Request has expired')])
  })

  it('takes a presigned PUT of the type that was signed', async () => {
    const command = new PutObjectCommand({ Bucket: BUCKET, Key: 'sent', ContentType: 'image/png' })
    const url = await getSignedUrl(signer(), command, { expiresIn: 60, signableHeaders: new Set(['content-type']) })
    const body = photo(5000)
    expect(await statusOf(fetch(url, { method: 'PUT', body, headers: { 'content-type': 'text/html' } }))).toBe('403 SignatureDoesNotMatch')
    expect(await statusOf(fetch(url, { method: 'PUT', body, headers: { 'content-type': 'image/png' } }))).toBe('200')
    expect(await statusOf(fetch(url, { method: 'PUT', body, headers: { 'content-type': 'image/png', 'x-amz-meta-a': 'b' } }))).toBe('403 AccessDenied')
    const found = await fake.client().send(new GetObjectCommand({ Bucket: BUCKET, Key: 'sent' }))
    expect([found.ContentType, Buffer.compare(await found.Body?.transformToByteArray() ?? body.subarray(1), body)]).toEqual(['image/png', 0])
  })

  describe('for a form', () => {
    const terms = (Expires = 60) => createPresignedPost(signer(), {
      Bucket: BUCKET,
      Key: 'forms/${filename}',
      Expires,
      Conditions: [['content-length-range', 10, 1000], ['starts-with', '$Content-Type', 'image/'], { 'x-amz-meta-run': '12' }],
      Fields: { 'x-amz-meta-run': '12' },
    })
    const post = async (change: Record<string, string> = {}, bytes = 100, type = 'image/png') => {
      const { url, fields } = await terms()
      const form = new FormData()
      for (const [name, value] of Object.entries({ ...fields, 'Content-Type': type, ...change })) form.set(name, value)
      form.set('file', new Blob([photo(bytes)]), 'piece 7.png')
      return statusOf(fetch(url, { method: 'POST', body: form }))
    }

    it('takes a file within its terms', async () => {
      expect(await post()).toBe('204')
      expect(await post({ success_action_status: '201' })).toBe('403 AccessDenied')
      const found = await fake.client().send(new GetObjectCommand({ Bucket: BUCKET, Key: 'forms/piece 7.png' }))
      expect(found).toMatchObject({ ContentLength: 100, ContentType: 'image/png', Metadata: { run: '12' } })
    })

    it.each([
      ['is too long', {}, 1001, 'image/png', '400 EntityTooLarge'],
      ['is too short', {}, 9, 'image/png', '400 EntityTooSmall'],
      ['is of another type', {}, 100, 'text/html', '403 AccessDenied'],
      ['goes elsewhere', { key: 'elsewhere' }, 100, 'image/png', '403 AccessDenied'],
      ['says something else', { 'x-amz-meta-run': '13' }, 100, 'image/png', '403 AccessDenied'],
      ['says something more', { 'x-amz-meta-more': '1' }, 100, 'image/png', '403 AccessDenied'],
      ['comes with changed terms', { Policy: Buffer.from('{"expiration":"2999-01-01T00:00:00Z","conditions":[]}').toString('base64') }, 100, 'image/png', '403 SignatureDoesNotMatch'],
    ])('refuses a file that %s', async (_, change, bytes, type, refusal) => {
      expect(await post(change, bytes, type)).toBe(refusal)
    })

    it('refuses a file that comes too late', async () => {
      const { url, fields } = await terms(1)
      const form = new FormData()
      for (const [name, value] of Object.entries({ ...fields, 'Content-Type': 'image/png' })) form.set(name, value)
      form.set('file', new Blob([photo(100)]), 'late.png')
      const now = vi.spyOn(Date, 'now').mockReturnValue(Date.now() + 5000)
      expect(await statusOf(fetch(url, { method: 'POST', body: form }))).toBe('403 AccessDenied')
      now.mockRestore()
    })
  })

  it('answers a browser that asks before it sends', async () => {
    const headers = { 'origin': 'http://127.0.0.1:3000', 'access-control-request-method': 'PUT', 'access-control-request-headers': 'content-type' }
    const got = await fetch(`${fake.endpoint}/${BUCKET}/k`, { method: 'OPTIONS', headers })
    expect([got.status, got.headers.get('access-control-allow-origin'), got.headers.get('access-control-allow-headers')])
      .toEqual([200, 'http://127.0.0.1:3000', 'content-type'])
    expect(got.headers.get('access-control-allow-methods')).toContain('PUT')
  })

  it('says plainly what it does not do', async () => {
    const url = await getSignedUrl(signer(), new GetObjectCommand({ Bucket: BUCKET, Key: 'private', VersionId: '1' }), { expiresIn: 60 })
    expect(await statusOf(fetch(url))).toBe('501 NotImplemented')
    expect(await statusOf(fetch(`${fake.endpoint}/${BUCKET}/%E0%A4%A`))).toBe('400 InvalidURI')
  })
})
