import type { IncomingMessage, ServerResponse } from 'node:http'
import { S3Error, tooLarge } from './s3-error'
import { queryPairs } from './signature'
import { xmlDocument } from './xml'
import type { XmlElements } from './xml'

/** One request, taken apart. */
export interface S3Request {
  method: string
  /** Path as it came, without the query. */
  path: string
  bucket: string
  key: string
  query: [string, string][]
  headers: Record<string, string>
  body: Buffer
  /** Headers that came after a chunked body. */
  trailers: Record<string, string>
}

/** What goes back; a stream is left to the sender. */
export interface S3Answer {
  status: number
  headers?: Record<string, string>
  body?: string | { file: string, start: number, end: number }
}

/** Longest key S3 takes, in bytes. */
const KEY_BYTES_MAX = 1024

/** The first value of a query parameter. */
export function param(request: Pick<S3Request, 'query'>, name: string): string | undefined {
  return request.query.find(([given]) => given === name)?.[1]
}

/** An answer in XML. */
export function xmlAnswer(root: string, content: XmlElements, status = 200, headers: Record<string, string> = {}): S3Answer {
  return { status, headers: { 'content-type': 'application/xml', ...headers }, body: xmlDocument(root, content) }
}

/** Reads all of a request but its body. */
export function readHead(message: IncomingMessage): Omit<S3Request, 'body' | 'trailers'> {
  const [path = '/', query = ''] = (message.url ?? '/').split(/\?(.*)/s)
  const headers = Object.fromEntries(Object.entries(message.headers).map(([name, value]) => [name, String(value)]))
  try {
    const [, bucket = '', key = ''] = (/^\/([^/]*)\/?(.*)$/s.exec(path) ?? []).map(decodeURIComponent)
    if (Buffer.byteLength(key) > KEY_BYTES_MAX) throw new S3Error('KeyTooLongError', 'Your key is too long', 400)
    return { method: message.method ?? 'GET', path, bucket, key, query: queryPairs(query), headers }
  }
  catch (error) {
    if (error instanceof URIError) throw new S3Error('InvalidURI', 'Couldn\'t parse the specified URI.', 400)
    throw error
  }
}

/** Reads a body of at most `most` bytes. */
export async function readBody(message: IncomingMessage, most: number): Promise<Buffer> {
  if (Number(message.headers['content-length'] ?? 0) > most) throw tooLarge(most)
  const chunks: Buffer[] = []
  let total = 0
  for await (const chunk of message as AsyncIterable<Buffer>) {
    total += chunk.length
    if (total > most) throw tooLarge(most)
    chunks.push(chunk)
  }
  return Buffer.concat(chunks)
}

/** Turns an error into what a client of S3 expects to read. */
export function errorAnswer(error: unknown, resource: string, requestId: string): S3Answer {
  const refusal = error instanceof S3Error
    ? error
    : new S3Error('InternalError', 'We encountered an internal error. Please try again.', 500)
  const { code, message } = refusal
  const text = xmlDocument('Error', { Code: code, Message: message, Resource: resource, RequestId: requestId })
  return { status: refusal.status, headers: { 'content-type': 'application/xml', ...refusal.headers }, body: text.replace(/ xmlns="[^"]*"/, '') }
}

/** Lets a page of any origin ask, since it still needs a signature to get anything. */
export function allowOrigin(message: IncomingMessage, response: ServerResponse): void {
  const { origin, 'access-control-request-headers': headers } = message.headers
  if (origin === undefined) return
  response.setHeader('access-control-allow-origin', origin)
  response.setHeader('access-control-expose-headers', 'ETag, x-amz-request-id, x-amz-checksum-crc32')
  response.setHeader('vary', 'Origin')
  if (message.method !== 'OPTIONS') return
  response.setHeader('access-control-allow-methods', 'GET, HEAD, PUT, POST, DELETE')
  response.setHeader('access-control-max-age', '600')
  if (headers !== undefined) response.setHeader('access-control-allow-headers', headers)
}
