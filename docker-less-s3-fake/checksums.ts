import { createHash } from 'node:crypto'
import { crc32 } from 'node:zlib'
import { badDigest, invalidRequest, notImplemented } from './s3-error'

/** Castagnoli polynomial, bits reversed (RFC 3720 appendix B.4). */
const CASTAGNOLI = 0x82f63b78

const CRC32C_TABLE = Uint32Array.from({ length: 256 }, (_, byte) => {
  let rest = byte
  for (let bit = 0; bit < 8; bit++) rest = rest & 1 ? (rest >>> 1) ^ CASTAGNOLI : rest >>> 1
  return rest >>> 0
})

/** CRC-32C of some bytes, as an unsigned 32-bit number. */
export function crc32c(bytes: Uint8Array): number {
  let rest = 0xffffffff
  for (const byte of bytes) rest = (CRC32C_TABLE[(rest ^ byte) & 0xff] ?? 0) ^ (rest >>> 8)
  return (rest ^ 0xffffffff) >>> 0
}

const bigEndian = (value: number) => Buffer.from([value >>> 24, value >>> 16, value >>> 8, value]).toString('base64')

const ALGORITHMS: Record<string, (bytes: Uint8Array) => string> = {
  crc32: bytes => bigEndian(crc32(bytes)),
  crc32c: bytes => bigEndian(crc32c(bytes)),
  sha1: bytes => createHash('sha1').update(bytes).digest('base64'),
  sha256: bytes => createHash('sha256').update(bytes).digest('base64'),
}

const PREFIX = 'x-amz-checksum-'
const NOT_A_SUM = new Set(['mode', 'algorithm', 'type'])

/** MD5 of some bytes in hex: what S3 calls the ETag. */
export const md5Hex = (bytes: Uint8Array) => createHash('md5').update(bytes).digest('hex')
/** SHA-256 of some bytes in hex. */
export const sha256Hex = (bytes: Uint8Array | string) => createHash('sha256').update(bytes).digest('hex')

/**
 * Holds a body against every sum that came with it, in headers, trailers or form fields (names in lower case).
 * Returns the sums by algorithm, base64, to be kept with the object.
 */
export function verifyChecksums(bytes: Uint8Array, given: Record<string, string>): Record<string, string> {
  const md5 = given['content-md5']
  if (md5 !== undefined) {
    if (Buffer.from(md5, 'base64').length !== 16) throw invalidRequest('The Content-MD5 you specified is not valid.')
    if (createHash('md5').update(bytes).digest('base64') !== md5) throw badDigest('Content-MD5')
  }
  const sums: Record<string, string> = {}
  for (const [name, value] of Object.entries(given)) {
    if (!name.startsWith(PREFIX)) continue
    const algorithm = name.slice(PREFIX.length)
    if (NOT_A_SUM.has(algorithm)) continue
    const sum = ALGORITHMS[algorithm]
    if (!sum) throw notImplemented(`The checksum ${algorithm}`)
    if (sum(bytes) !== value) throw badDigest(algorithm.toUpperCase())
    sums[algorithm] = value
  }
  return sums
}
