import { createHmac, timingSafeEqual } from 'node:crypto'
import { sha256Hex } from './checksums'
import { accessDenied, signatureDoesNotMatch } from './s3-error'

// AWS Signature Version 4 as its public documentation describes it ("Authenticating Requests", Amazon S3 API reference).

/** The one way of signing that is known here. */
export const ALGORITHM = 'AWS4-HMAC-SHA256'

/** Who may come in, and where they must think they are. */
export interface Credentials {
  accessKeyId: string
  secretAccessKey: string
  region: string
}

/** The day, region and service a signature is good for. */
export interface Scope {
  accessKeyId: string
  day: string
  text: string
}

/** HMAC-SHA-256 of a text. */
export const hmac = (key: string | Buffer, text: string) => createHmac('sha256', key).update(text).digest()

/** Percent-encodes as RFC 3986 asks: everything but letters, digits and `-_.~`. */
export function uriEncode(text: string): string {
  return encodeURIComponent(text).replace(/[!'()*]/g, char => `%${char.charCodeAt(0).toString(16).toUpperCase()}`)
}

/** Name and value pairs of a query, decoded; a plus sign is a plus sign. */
export function queryPairs(query: string): [string, string][] {
  return query.split('&').filter(Boolean).map((pair) => {
    const cut = pair.indexOf('=')
    return cut < 0 ? [decodeURIComponent(pair), ''] : [decodeURIComponent(pair.slice(0, cut)), decodeURIComponent(pair.slice(cut + 1))]
  })
}

/** Reads `key/day/region/s3/aws4_request` and refuses what is not meant for this place. */
export function readScope(credential: string, credentials: Credentials): Scope {
  const [accessKeyId = '', day = '', region, service, end, more] = credential.split('/')
  if (service !== 's3' || end !== 'aws4_request' || more !== undefined || !/^\d{8}$/.test(day)) throw accessDenied('The credential is malformed')
  if (accessKeyId !== credentials.accessKeyId) throw accessDenied('The access key does not exist here')
  if (region !== credentials.region) throw accessDenied(`The region is wrong; expecting '${credentials.region}'`)
  return { accessKeyId, day, text: `${day}/${region}/s3/aws4_request` }
}

/** The key that signs for one day, region and service. */
export function signingKey(credentials: Credentials, day: string): Buffer {
  const days = hmac(`AWS4${credentials.secretAccessKey}`, day)
  return hmac(hmac(hmac(days, credentials.region), 's3'), 'aws4_request')
}

/** The instant an `x-amz-date` names, in milliseconds. */
export function readAmzDate(text: string): number {
  const match = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/.exec(text)
  if (!match) throw accessDenied('A request needs a date in ISO 8601 basic format')
  const [, year, month, day, hour, minute, second] = match.map(Number)
  return Date.UTC(year ?? 0, (month ?? 1) - 1, day, hour, minute, second)
}

/** The parts of a request that a signature covers. */
export interface SignedParts {
  method: string
  path: string
  query: [string, string][]
  headers: Record<string, string>
  signedHeaders: string[]
  payloadHash: string
}

function canonicalRequest(parts: SignedParts): string {
  const query = parts.query
    .map(([name, value]) => [uriEncode(name), uriEncode(value)] as const)
    .sort(([a, x], [b, y]) => (a < b ? -1 : a > b ? 1 : x < y ? -1 : x > y ? 1 : 0))
    .map(([name, value]) => `${name}=${value}`)
    .join('&')
  const headers = parts.signedHeaders.map((name) => {
    const value = parts.headers[name]
    if (value === undefined) throw signatureDoesNotMatch(`the signed header ${name} is missing`)
    return `${name}:${value.trim().replace(/ +/g, ' ')}\n`
  }).join('')
  const path = parts.path.split('/').map(segment => uriEncode(decodeURIComponent(segment))).join('/')
  return [parts.method, path, query, headers, parts.signedHeaders.join(';'), parts.payloadHash].join('\n')
}

/** The signature a request should carry, in hex. */
export function requestSignature(parts: SignedParts, amzDate: string, scope: Scope, key: Buffer): string {
  return hmac(key, [ALGORITHM, amzDate, scope.text, sha256Hex(canonicalRequest(parts))].join('\n')).toString('hex')
}

/** Compares two signatures in a time that tells nothing about where they differ. */
export function sameSignature(a: string, b: string): boolean {
  const left = Buffer.from(a)
  const right = Buffer.from(b)
  return left.length === right.length && timingSafeEqual(left, right)
}
