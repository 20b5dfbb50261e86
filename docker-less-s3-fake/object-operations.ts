import { readFile } from 'node:fs/promises'
import { md5Hex, verifyChecksums } from './checksums'
import { isNotModified, readRange, writeCondition } from './conditions'
import { param, xmlAnswer } from './exchange'
import { invalidRequest, noSuchKey } from './s3-error'
import type { Bucket, ObjectRecord } from './bucket'
import type { S3Answer, S3Request } from './exchange'
import type { Store } from './store'

const KEPT_HEADERS = ['content-type', 'cache-control', 'content-disposition', 'content-encoding', 'content-language', 'expires']
const IN_URL = new Map(KEPT_HEADERS.map(name => [`response-${name}`, name]))

/** The headers that stay with an object; `aws-chunked` is how it travelled and not how it is kept. */
export function keptHeaders(given: Record<string, string>): Record<string, string> {
  const kept = Object.entries(given).filter(([name]) => KEPT_HEADERS.includes(name) || name.startsWith('x-amz-meta-'))
  return Object.fromEntries(kept.map(([name, value]) => {
    if (name !== 'content-encoding') return [name, value]
    return [name, value.split(',').map(coding => coding.trim()).filter(coding => coding !== 'aws-chunked').join(', ')]
  }).filter(([, value]) => value !== ''))
}

function sumHeaders(checksums: Record<string, string>): Record<string, string> {
  return Object.fromEntries(Object.entries(checksums).map(([algorithm, sum]) => [`x-amz-checksum-${algorithm}`, sum]))
}

/** Keeps a body under a key. */
export async function putObject(bucket: Bucket, request: S3Request): Promise<S3Answer> {
  const checksums = verifyChecksums(request.body, { ...request.headers, ...request.trailers })
  const record = await bucket.put({
    key: request.key,
    bytes: request.body.length,
    etag: md5Hex(request.body),
    headers: keptHeaders(request.headers),
    checksums,
  }, request.body, writeCondition(request.headers))
  return { status: 200, headers: { etag: `"${record.etag}"`, ...sumHeaders(checksums) } }
}

function describe(record: ObjectRecord, request: S3Request): Record<string, string> {
  const fromUrl = request.query.flatMap(([name, value]) => (IN_URL.has(name) ? [[IN_URL.get(name) ?? '', value]] : []))
  return {
    'content-type': 'binary/octet-stream',
    ...record.headers,
    ...Object.fromEntries(fromUrl) as Record<string, string>,
    'etag': `"${record.etag}"`,
    'last-modified': new Date(record.modifiedAt).toUTCString(),
    'accept-ranges': 'bytes',
  }
}

/** Gives an object back, or its description only for HEAD. */
export function getObject(bucket: Bucket, request: S3Request): S3Answer {
  const record = bucket.find(request.key)
  if (!record) throw noSuchKey()
  const headers = describe(record, request)
  if (isNotModified(request.headers, record)) return { status: 304, headers }
  const range = readRange(request.headers.range, record.bytes)
  const { start, end } = range ?? { start: 0, end: record.bytes - 1 }
  headers['content-length'] = String(end - start + 1)
  if (range) headers['content-range'] = `bytes ${start}-${end}/${record.bytes}`
  else if (request.headers['x-amz-checksum-mode']?.toUpperCase() === 'ENABLED') Object.assign(headers, sumHeaders(record.checksums))
  return { status: range ? 206 : 200, headers, body: { file: bucket.dataPath(record.file), start, end } }
}

/** Forgets an object; S3 says the same whether it was there or not. */
export async function deleteObject(bucket: Bucket, request: S3Request): Promise<S3Answer> {
  await bucket.remove(request.key)
  return { status: 204 }
}

/** Copies an object here from any bucket, with its headers or with new ones. */
export async function copyObject(store: Store, bucket: Bucket, request: S3Request): Promise<S3Answer> {
  const [, from = '', key = ''] = /^\/?([^/]+)\/(.+)$/s.exec(request.headers['x-amz-copy-source'] ?? '') ?? []
  const source = store.find(from)
  const record = source.find(decodeURIComponent(key))
  if (!record) throw noSuchKey()
  const isReplaced = request.headers['x-amz-metadata-directive'] === 'REPLACE'
  if (source === bucket && record.key === request.key && !isReplaced) {
    throw invalidRequest('This copy request is illegal because it is trying to copy an object to itself without changing the object\'s metadata.')
  }
  const body = await readFile(source.dataPath(record.file))
  const copy = await bucket.put({
    key: request.key,
    bytes: body.length,
    etag: md5Hex(body),
    headers: isReplaced ? keptHeaders(request.headers) : record.headers,
    checksums: record.checksums,
  }, body, writeCondition(request.headers))
  return xmlAnswer('CopyObjectResult', { ETag: `"${copy.etag}"`, LastModified: new Date(copy.modifiedAt).toISOString() })
}

/** True when a URL asks for more than the object itself, such as its tags. */
export function asksForAspect(request: S3Request): string | undefined {
  const aspects = ['acl', 'tagging', 'attributes', 'retention', 'legal-hold', 'torrent', 'restore', 'select', 'versionId']
  return aspects.find(aspect => param(request, aspect) !== undefined)
}
