import type { H3Event } from 'h3'
import { Problem } from '#shared/errors/problem'

/**
 * The bytes of the request's body, at most `maxBytes` of them. Counts what arrives, so that a body that does not
 * say its length, or says a wrong one, is refused like any other.
 * @throws {Problem} request/too-large
 */
export function readLimited(event: H3Event, maxBytes: number): Promise<Buffer> {
  const request = event.node.req
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = []
    let bytes = 0
    const refuse = () => {
      request.off('data', take)
      // What still comes is thrown away: with the line cut, its sender would never read why. Node ends a request that goes on for minutes.
      request.resume()
      reject(new Problem({ code: 'request/too-large' }))
    }
    const take = (chunk: Buffer) => {
      bytes += chunk.length
      if (bytes > maxBytes) return refuse()
      chunks.push(chunk)
    }
    if (Number(request.headers['content-length'] ?? 0) > maxBytes) return refuse()
    request.on('data', take)
    request.once('end', () => resolve(Buffer.concat(chunks, bytes)))
    request.once('error', reject)
    request.once('aborted', () => reject(new Error('The request was cut off.')))
  })
}
