import { randomUUID } from 'node:crypto'
import { open } from 'node:fs/promises'
import { createServer } from 'node:http'
import { pipeline } from 'node:stream/promises'
import { authorise } from './authorise'
import { isChunked, unchunk } from './aws-chunked'
import { sha256Hex } from './checksums'
import { allowOrigin, errorAnswer, readBody, readHead } from './exchange'
import { postForm } from './post-form'
import { invalidRequest, S3Error, tooLarge } from './s3-error'
import { perform } from './perform'
import { Store } from './store'
import type { IncomingMessage, Server, ServerResponse } from 'node:http'
import type { AddressInfo } from 'node:net'
import type { S3Answer, S3Request } from './exchange'
import type { Credentials } from './signature'

const MEBIBYTE = 1024 * 1024

/** What an object server needs to start. */
export interface ObjectServerOptions extends Credentials {
  /** Folder that holds the buckets. */
  root: string
  /** 0 takes any free port. */
  port?: number
  /** Buckets that must be there. */
  buckets?: readonly string[]
  /** Longest body taken in one request, and largest object put together, in bytes. */
  bodyBytesMax?: number
  /** Where unexpected errors go. */
  onError?: (error: unknown) => void
}

/** A running object server. */
export interface ObjectServer {
  endpoint: string
  close(): Promise<void>
}

type Head = Omit<S3Request, 'body' | 'trailers'>

const isForm = (head: Head) => head.method === 'POST' && (head.headers['content-type'] ?? '').startsWith('multipart/form-data')

/** Reads a body the way its signature says it was sent, and refuses it when it is not what was signed. */
async function readSigned(message: IncomingMessage, head: Head, options: Required<ObjectServerOptions>): Promise<S3Request> {
  const authority = authorise(head, options, Date.now())
  // Framing adds a line to each chunk; the object itself is held to the limit below.
  const framing = isChunked(authority.payloadHash) ? MEBIBYTE : 0
  const raw = await readBody(message, options.bodyBytesMax + framing)
  if (isChunked(authority.payloadHash)) {
    const { bytes, trailers } = unchunk(raw, authority, head.headers['x-amz-decoded-content-length'])
    const announced = (head.headers['x-amz-trailer'] ?? '').split(',').map(name => name.trim().toLowerCase()).filter(Boolean)
    if (bytes.length > options.bodyBytesMax) throw tooLarge(options.bodyBytesMax)
    if (announced.some(name => trailers[name] === undefined)) throw invalidRequest('An announced trailer is missing')
    return { ...head, body: bytes, trailers }
  }
  if (authority.payloadHash !== 'UNSIGNED-PAYLOAD' && sha256Hex(raw) !== authority.payloadHash) {
    throw new S3Error('XAmzContentSHA256Mismatch', 'The provided \'x-amz-content-sha256\' header does not match what was computed.', 400)
  }
  return { ...head, body: raw, trailers: {} }
}

async function answer(message: IncomingMessage, head: Head, store: Store, options: Required<ObjectServerOptions>): Promise<S3Answer> {
  if (head.method === 'OPTIONS') return { status: 200 }
  if (isForm(head)) {
    const body = await readBody(message, options.bodyBytesMax)
    return postForm(store.find(head.bucket), { ...head, body, trailers: {} }, options, Date.now())
  }
  return perform(store, await readSigned(message, head, options), options.bodyBytesMax)
}

async function send(response: ServerResponse, { status, headers = {}, body }: S3Answer, isHead: boolean): Promise<void> {
  if (typeof body === 'object') {
    // Opened before the head goes out, so that a version replaced meanwhile is still read to its end.
    const file = await open(body.file)
    response.writeHead(status, headers)
    if (isHead || body.end < body.start) {
      await file.close()
      response.end()
      return
    }
    await pipeline(file.createReadStream({ start: body.start, end: body.end }), response)
    return
  }
  const isBare = body === undefined || isHead || status === 304
  response.writeHead(status, isBare && status !== 204 && status !== 304 ? { ...headers, 'content-length': '0' } : headers)
  response.end(isBare ? undefined : body)
}

async function serve(message: IncomingMessage, response: ServerResponse, store: Store, options: Required<ObjectServerOptions>): Promise<void> {
  const requestId = randomUUID()
  response.setHeader('x-amz-request-id', requestId)
  allowOrigin(message, response)
  const isHead = message.method === 'HEAD'
  try {
    await send(response, await answer(message, readHead(message), store, options), isHead)
  }
  catch (error) {
    if (!(error instanceof S3Error)) options.onError(error)
    if (response.headersSent) {
      response.destroy()
      return
    }
    // What is left of a refused body is read away, so that its sender comes to read the refusal.
    if (!message.complete) response.setHeader('connection', 'close')
    message.resume()
    await send(response, errorAnswer(error, (message.url ?? '').split('?')[0] ?? '', requestId), isHead)
  }
}

const listen = (server: Server, port: number) => new Promise<void>((resolve, reject) => {
  server.once('error', reject)
  server.listen(port, '127.0.0.1', resolve)
})

/** Starts an S3-compatible object server on loopback that keeps its objects on disk. */
export async function startObjectServer(given: ObjectServerOptions): Promise<ObjectServer> {
  const options = { port: 0, buckets: [], bodyBytesMax: 64 * MEBIBYTE, onError: () => undefined, ...given }
  const store = await Store.open(options.root)
  for (const name of options.buckets) {
    if (!store.names().includes(name)) await store.create(name)
  }
  const server = createServer((message, response) => {
    serve(message, response, store, options).catch((error: unknown) => {
      options.onError(error)
      response.destroy()
    })
  })
  await listen(server, options.port)
  const { port } = server.address() as AddressInfo
  return {
    endpoint: `http://127.0.0.1:${port}`,
    close: () => new Promise((resolve) => {
      server.close(() => resolve())
      server.closeAllConnections()
    }),
  }
}
