import type { H3Event } from 'h3'
import { Problem } from '#shared/errors/problem'

/**
 * The bytes of the request's body, at most `maxBytes` of them. Counts what arrives, so that a body that does not
 * say its length, or says a wrong one, is refused like any other.
 * @throws {Problem} request/too-large
 */
export async function readLimited(event: H3Event, maxBytes: number): Promise<Buffer> {
  const tooLarge = () => new Problem({ code: 'request/too-large' })
  if (Number(event.node.req.headers['content-length'] ?? 0) > maxBytes) throw tooLarge()

  const chunks: Buffer[] = []
  let bytes = 0
  for await (const chunk of event.node.req as AsyncIterable<Uint8Array | string>) {
    const part = Buffer.from(chunk as Uint8Array)
    bytes += part.length
    if (bytes > maxBytes) throw tooLarge()
    chunks.push(part)
  }
  return Buffer.concat(chunks, bytes)
}
