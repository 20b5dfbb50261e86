import {
  DeleteObjectsCommand, GetObjectCommand, HeadObjectCommand, ListObjectsV2Command, NoSuchKey, NotFound, PutObjectCommand, S3Client,
} from '@aws-sdk/client-s3'
import { settings } from '#server/settings'
import type { PhotoSettings } from '#server/settings'

/** Objects one S3 request may delete. */
const DELETE_AT_ONCE = 1000

/** What is kept under a key. */
export interface StoredObject {
  bytes: Uint8Array<ArrayBuffer>
  contentType: string
  etag: string
}

/** A key in the store, and how much lies under it. */
export interface ObjectListing {
  key: string
  bytes: number
  modifiedAt: Date
}

/** The place where photos and exports are kept: bytes under a key. */
export interface ObjectStore {
  /** Keeps `bytes` under `key`, whatever was there before. */
  put(key: string, bytes: Uint8Array, contentType: string): Promise<void>
  /** What is kept under `key`; undefined when nothing is. */
  get(key: string): Promise<StoredObject | undefined>
  /** True when something is kept under `key`. */
  has(key: string): Promise<boolean>
  /** Forgets what is kept under each key; a key with nothing under it is no error. */
  remove(keys: readonly string[]): Promise<void>
  /** Every key that starts with `prefix`, in the order of its bytes, fetched page by page. */
  list(prefix: string): AsyncGenerator<ObjectListing>
  /** Ends the connections. */
  close(): void
}

/** Opens the store over the S3 protocol, with the bucket in the path so that it works with any host name. */
export function openObjectStore(place: PhotoSettings): ObjectStore {
  const client = new S3Client({
    endpoint: place.endpoint,
    region: place.region,
    forcePathStyle: true,
    credentials: { accessKeyId: place.accessKeyId, secretAccessKey: place.secretAccessKey },
  })
  const Bucket = place.bucket

  return {
    async put(Key, Body, ContentType) {
      await client.send(new PutObjectCommand({ Bucket, Key, Body, ContentType, ContentLength: Body.byteLength }))
    },

    async get(Key) {
      try {
        const found = await client.send(new GetObjectCommand({ Bucket, Key }))
        const bytes = await found.Body?.transformToByteArray() ?? new Uint8Array()
        return { bytes: new Uint8Array(bytes), contentType: found.ContentType ?? 'application/octet-stream', etag: found.ETag ?? '' }
      }
      catch (error) {
        if (error instanceof NoSuchKey) return undefined
        throw error
      }
    },

    async has(Key) {
      try {
        await client.send(new HeadObjectCommand({ Bucket, Key }))
        return true
      }
      catch (error) {
        if (error instanceof NotFound) return false
        throw error
      }
    },

    async remove(keys) {
      for (let from = 0; from < keys.length; from += DELETE_AT_ONCE) {
        const Objects = keys.slice(from, from + DELETE_AT_ONCE).map(Key => ({ Key }))
        const { Errors = [] } = await client.send(new DeleteObjectsCommand({ Bucket, Delete: { Objects, Quiet: true } }))
        const [first] = Errors
        if (first) throw new Error(`The photo store kept ${Errors.length} of ${Objects.length} objects: ${first.Key} ${first.Code}`)
      }
    },

    async* list(Prefix) {
      let ContinuationToken: string | undefined
      do {
        const page = await client.send(new ListObjectsV2Command({ Bucket, Prefix, ContinuationToken }))
        for (const { Key, Size, LastModified } of page.Contents ?? []) {
          if (Key !== undefined) yield { key: Key, bytes: Size ?? 0, modifiedAt: LastModified ?? new Date(0) }
        }
        ContinuationToken = page.NextContinuationToken
      } while (ContinuationToken)
    },

    close: () => client.destroy(),
  }
}

let current: ObjectStore | undefined

/** The store this server keeps its photos in, opened on first use. */
export function objectStore(): ObjectStore {
  current ??= openObjectStore(settings().photos)
  return current
}
