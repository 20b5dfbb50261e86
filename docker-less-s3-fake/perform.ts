import { deleteObjects, listBuckets, listObjects } from './bucket-operations'
import { param, xmlAnswer } from './exchange'
import { asksForAspect, copyObject, deleteObject, getObject, putObject } from './object-operations'
import { notImplemented, S3Error } from './s3-error'
import { abortUpload, beginUpload, completeUpload, uploadPart } from './upload-operations'
import type { Bucket } from './bucket'
import type { S3Answer, S3Request } from './exchange'
import type { Store } from './store'

const methodNotAllowed = () => new S3Error('MethodNotAllowed', 'The specified method is not allowed against this resource.', 405)

async function performOnObject(store: Store, bucket: Bucket, request: S3Request, bodyBytesMax: number): Promise<S3Answer> {
  const aspect = asksForAspect(request)
  if (aspect !== undefined) throw notImplemented(`The aspect ${aspect} of an object`)
  const uploadId = param(request, 'uploadId')
  switch (request.method) {
    case 'PUT':
      if (uploadId !== undefined) return uploadPart(bucket, request, uploadId)
      return request.headers['x-amz-copy-source'] === undefined ? putObject(bucket, request) : copyObject(store, bucket, request)
    case 'GET':
    case 'HEAD':
      if (uploadId !== undefined) throw notImplemented('A list of parts')
      return getObject(bucket, request)
    case 'DELETE':
      return uploadId === undefined ? deleteObject(bucket, request) : abortUpload(bucket, request, uploadId)
    case 'POST':
      if (param(request, 'uploads') !== undefined) return beginUpload(bucket, request)
      if (uploadId !== undefined) return completeUpload(bucket, request, uploadId, bodyBytesMax)
      throw methodNotAllowed()
    default:
      throw methodNotAllowed()
  }
}

async function performOnBucket(store: Store, request: S3Request): Promise<S3Answer> {
  if (request.method === 'PUT') {
    if (request.query.some(([name]) => name !== 'x-id' && !name.startsWith('X-Amz-'))) throw notImplemented('This aspect of a bucket')
    await store.create(request.bucket)
    return { status: 200, headers: { location: `/${request.bucket}` } }
  }
  const bucket = store.find(request.bucket)
  switch (request.method) {
    case 'HEAD':
      return { status: 200 }
    case 'DELETE':
      await store.remove(request.bucket)
      return { status: 204 }
    case 'GET':
      if (param(request, 'location') !== undefined) return xmlAnswer('LocationConstraint', {})
      return listObjects(bucket, request)
    case 'POST':
      if (param(request, 'delete') !== undefined) return deleteObjects(bucket, request)
      throw methodNotAllowed()
    default:
      throw methodNotAllowed()
  }
}

/** Does what a signed request asks for. */
export async function perform(store: Store, request: S3Request, bodyBytesMax: number): Promise<S3Answer> {
  if (request.bucket === '') {
    if (request.method !== 'GET') throw methodNotAllowed()
    return listBuckets(store)
  }
  if (request.key === '') return performOnBucket(store, request)
  return performOnObject(store, store.find(request.bucket), request, bodyBytesMax)
}
