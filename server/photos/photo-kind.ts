import type { PhotoFormat } from '#shared/photos/photo-limits'

const ascii = (bytes: Uint8Array, from: number, to: number) => Buffer.from(bytes.subarray(from, to)).toString('latin1')

/** What a file is by its first bytes, or undefined: only these four ever reach the decoder, whatever name or type the file came with. */
export function photoKind(bytes: Uint8Array): PhotoFormat | undefined {
  if (bytes[0] === 0xFF && bytes[1] === 0xD8 && bytes[2] === 0xFF) return 'jpeg'
  if (ascii(bytes, 0, 8) === '\x89PNG\r\n\x1A\n') return 'png'
  if (ascii(bytes, 0, 4) === 'RIFF' && ascii(bytes, 8, 12) === 'WEBP') return 'webp'
  if (ascii(bytes, 4, 8) === 'ftyp' && ['avif', 'avis'].includes(ascii(bytes, 8, 12))) return 'avif'
  return undefined
}
