import { verifyChecksums } from './checksums'
import { writeCondition } from './conditions'
import { param, xmlAnswer } from './exchange'
import { keptHeaders } from './object-operations'
import { notImplemented } from './s3-error'
import { xmlBlocks, xmlText } from './xml'
import type { Bucket } from './bucket'
import type { S3Answer, S3Request } from './exchange'

/** Begins an upload in parts. */
export async function beginUpload(bucket: Bucket, request: S3Request): Promise<S3Answer> {
  const id = await bucket.uploads.begin({ key: request.key, headers: keptHeaders(request.headers) })
  return xmlAnswer('InitiateMultipartUploadResult', { Bucket: bucket.name, Key: request.key, UploadId: id })
}

/** Takes one part. */
export async function uploadPart(bucket: Bucket, request: S3Request, id: string): Promise<S3Answer> {
  if (request.headers['x-amz-copy-source'] !== undefined) throw notImplemented('A part copied from another object')
  verifyChecksums(request.body, { ...request.headers, ...request.trailers })
  const etag = await bucket.uploads.putPart(id, request.key, Number(param(request, 'partNumber')), request.body)
  return { status: 200, headers: { etag: `"${etag}"` } }
}

/** Makes one object of the named parts. */
export async function completeUpload(bucket: Bucket, request: S3Request, id: string, most: number): Promise<S3Answer> {
  const { headers } = await bucket.uploads.get(id, request.key)
  const parts = xmlBlocks(request.body.toString('utf8'), 'Part').map(part => ({
    number: Number(xmlText(part, 'PartNumber')),
    etag: (xmlText(part, 'ETag') ?? '').replaceAll('"', ''),
  }))
  const { bytes, etag } = await bucket.uploads.assemble(id, request.key, parts, most)
  await bucket.put({ key: request.key, bytes: bytes.length, etag, headers, checksums: {} }, bytes, writeCondition(request.headers))
  await bucket.uploads.forget(id)
  const Location = `http://${request.headers.host}${request.path}`
  return xmlAnswer('CompleteMultipartUploadResult', { Location, Bucket: bucket.name, Key: request.key, ETag: `"${etag}"` })
}

/** Gives an upload up and its parts away. */
export async function abortUpload(bucket: Bucket, request: S3Request, id: string): Promise<S3Answer> {
  await bucket.uploads.get(id, request.key)
  await bucket.uploads.forget(id)
  return { status: 204 }
}
