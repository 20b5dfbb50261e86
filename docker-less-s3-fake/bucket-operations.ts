import { verifyChecksums } from './checksums'
import { param, xmlAnswer } from './exchange'
import { invalidArgument, invalidRequest, S3Error } from './s3-error'
import { uriEncode } from './signature'
import { xmlBlocks, xmlText } from './xml'
import type { Bucket, ObjectRecord } from './bucket'
import type { S3Answer, S3Request } from './exchange'
import type { Store } from './store'
import type { XmlElements } from './xml'

const AT_ONCE = 1000

/** Names the buckets there are. */
export function listBuckets(store: Store): S3Answer {
  return xmlAnswer('ListAllMyBucketsResult', { Buckets: { Bucket: store.names().map(Name => ({ Name })) } })
}

/** Forgets up to a thousand objects in one go. */
export async function deleteObjects(bucket: Bucket, request: S3Request): Promise<S3Answer> {
  const given = { ...request.headers, ...request.trailers }
  if (Object.keys(verifyChecksums(request.body, given)).length === 0 && given['content-md5'] === undefined) {
    throw invalidRequest('Missing required header for this request: Content-MD5 or x-amz-checksum-*')
  }
  const xml = request.body.toString('utf8')
  const keys = xmlBlocks(xml, 'Object').map(object => xmlText(object, 'Key') ?? '')
  if (keys.length === 0 || keys.length > AT_ONCE) throw new S3Error('MalformedXML', 'Between 1 and 1000 keys are deleted at once', 400)
  for (const key of keys) await bucket.remove(key)
  const isQuiet = xmlText(xml, 'Quiet') === 'true'
  return xmlAnswer('DeleteResult', isQuiet ? {} : { Deleted: keys.map(Key => ({ Key })) })
}

/** One line of a listing: an object, or everything below a delimiter taken together. */
type Entry = { prefix: string } | { record: ObjectRecord }

/** Collects a page of entries after a key, and the last key it covers when there is more. */
function page(records: readonly ObjectRecord[], after: string, prefix: string, delimiter: string, most: number) {
  const entries: Entry[] = []
  let last = ''
  let covered = ''
  const order = Buffer.from(after)
  for (const record of records) {
    if (!record.key.startsWith(prefix) || (after !== '' && Buffer.compare(Buffer.from(record.key), order) <= 0)) continue
    const cut = delimiter === '' ? -1 : record.key.indexOf(delimiter, prefix.length)
    const common = cut < 0 ? '' : record.key.slice(0, cut + delimiter.length)
    const isCovered = common !== '' && common === covered
    if (!isCovered && entries.length === most) return { entries, next: last }
    if (common === '') entries.push({ record })
    else if (!isCovered) entries.push({ prefix: common })
    covered = common
    // Behind everything under a common prefix, so that the next page does not name it again.
    last = record.key
  }
  return { entries, next: undefined }
}

/** Lists a bucket in the order of its keys' bytes, page by page (ListObjectsV2). */
export function listObjects(bucket: Bucket, request: S3Request): S3Answer {
  if (param(request, 'list-type') !== '2') throw invalidArgument('Only list-type=2 is served')
  const prefix = param(request, 'prefix') ?? ''
  const delimiter = param(request, 'delimiter') ?? ''
  const token = param(request, 'continuation-token')
  const startAfter = param(request, 'start-after')
  const asked = Number(param(request, 'max-keys') ?? AT_ONCE)
  if (!Number.isInteger(asked) || asked < 0) throw invalidArgument('max-keys must be a whole number')
  const most = Math.min(asked, AT_ONCE)
  const isUrl = param(request, 'encoding-type') === 'url'
  const write = (text: string) => (isUrl ? uriEncode(text).replaceAll('%2F', '/') : text)

  const after = token === undefined ? startAfter ?? '' : Buffer.from(token, 'base64url').toString('utf8')
  const { entries, next } = most === 0 ? { entries: [], next: undefined } : page(bucket.list(), after, prefix, delimiter, most)
  const Contents: XmlElements[] = entries.flatMap(entry => ('record' in entry
    ? [{
        Key: write(entry.record.key),
        LastModified: new Date(entry.record.modifiedAt).toISOString(),
        ETag: `"${entry.record.etag}"`,
        Size: entry.record.bytes,
        StorageClass: 'STANDARD',
      }]
    : []))
  return xmlAnswer('ListBucketResult', {
    Name: bucket.name,
    Prefix: write(prefix),
    Delimiter: delimiter === '' ? undefined : write(delimiter),
    MaxKeys: asked,
    KeyCount: entries.length,
    IsTruncated: next !== undefined,
    EncodingType: isUrl ? 'url' : undefined,
    ContinuationToken: token,
    NextContinuationToken: next === undefined ? undefined : Buffer.from(next).toString('base64url'),
    StartAfter: startAfter === undefined ? undefined : write(startAfter),
    Contents,
    CommonPrefixes: entries.flatMap(entry => ('prefix' in entry ? [{ Prefix: write(entry.prefix) }] : [])),
  })
}
