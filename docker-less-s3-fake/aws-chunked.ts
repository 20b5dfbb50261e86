import { sha256Hex } from './checksums'
import { invalidRequest, signatureDoesNotMatch } from './s3-error'
import { hmac, sameSignature } from './signature'
import type { Authority } from './authorise'

const CHUNK = 'AWS4-HMAC-SHA256-PAYLOAD'
const TRAILER = 'AWS4-HMAC-SHA256-TRAILER'
const TRAILER_SIGNATURE = 'x-amz-trailer-signature'

/** A body without its chunk framing, and the headers that came after it. */
export interface Unchunked {
  bytes: Buffer
  trailers: Record<string, string>
}

/** True when the words in place of a payload hash announce a body in chunks. */
export const isChunked = (payloadHash: string) => payloadHash.startsWith('STREAMING-')

function readLine(body: Buffer, from: number): { line: string, next: number } {
  const end = body.indexOf('\r\n', from)
  if (end < 0) throw invalidRequest('The chunked body ends too early')
  return { line: body.toString('latin1', from, end), next: end + 2 }
}

function readTrailers(body: Buffer, from: number): Record<string, string> {
  const trailers: Record<string, string> = {}
  for (let at = from; at < body.length;) {
    const { line, next } = readLine(body, at)
    at = next
    if (line === '') break
    const cut = line.indexOf(':')
    if (cut < 1) throw invalidRequest('A trailer is malformed')
    trailers[line.slice(0, cut).toLowerCase()] = line.slice(cut + 1).trim()
  }
  return trailers
}

/** Each signature covers the one before it, so chunks can be neither changed, dropped nor swapped. */
function chainOf(authority: Authority) {
  let previous = authority.signature
  return (kind: string, hashes: string[], given: string | undefined) => {
    const expected = hmac(authority.key, [kind, authority.amzDate, authority.scope.text, previous, ...hashes].join('\n')).toString('hex')
    if (!sameSignature(expected, given ?? '')) throw signatureDoesNotMatch('a chunk was changed on its way')
    previous = expected
  }
}

/** Takes the `aws-chunked` framing off a body and checks the signature of every chunk and of the trailer. */
export function unchunk(body: Buffer, authority: Authority, decodedLength: string | undefined): Unchunked {
  const isSigned = authority.payloadHash.startsWith('STREAMING-AWS4-HMAC-SHA256-PAYLOAD')
  const hasTrailer = authority.payloadHash.endsWith('-TRAILER')
  if (!isSigned && authority.payloadHash !== 'STREAMING-UNSIGNED-PAYLOAD-TRAILER') throw invalidRequest(`${authority.payloadHash} is not supported`)
  const verify = chainOf(authority)
  const chunks: Buffer[] = []
  let at = 0
  for (;;) {
    const { line, next } = readLine(body, at)
    const match = /^([0-9a-f]{1,8})(?:;chunk-signature=([0-9a-f]{64}))?$/i.exec(line)
    if (!match) throw invalidRequest('A chunk header is malformed')
    const length = Number.parseInt(match[1] ?? '', 16)
    const chunk = body.subarray(next, next + length)
    if (chunk.length !== length) throw invalidRequest('The chunked body ends too early')
    if (isSigned) verify(CHUNK, [sha256Hex(''), sha256Hex(chunk)], match[2])
    at = next + length
    if (length === 0) break
    if (body.toString('latin1', at, at + 2) !== '\r\n') throw invalidRequest('A chunk is longer than it says')
    at += 2
    chunks.push(chunk)
  }
  const { [TRAILER_SIGNATURE]: trailerSignature, ...trailers } = hasTrailer ? readTrailers(body, at) : {}
  if (isSigned && hasTrailer) {
    const text = Object.entries(trailers).map(([name, value]) => `${name}:${value}\n`).join('')
    verify(TRAILER, [sha256Hex(text)], trailerSignature)
  }
  const bytes = Buffer.concat(chunks)
  if (decodedLength === undefined || Number(decodedLength) !== bytes.length) throw invalidRequest('x-amz-decoded-content-length does not fit the body')
  return { bytes, trailers }
}
