import { expect, it } from 'vitest'
import { photoKind } from '#server/photos/photo-kind'

const bytes = (text: string) => Uint8Array.from(text, character => character.charCodeAt(0))

it.each([
  ['a JPEG', '\xFF\xD8\xFF\xE0', 'jpeg'],
  ['a PNG', '\x89PNG\r\n\x1A\n', 'png'],
  ['a WebP', 'RIFF\0\0\0\0WEBP', 'webp'],
  ['an AVIF', '\0\0\0\x20ftypavif', 'avif'],
])('knows %s by its first bytes', (_, head, kind) => {
  expect(photoKind(bytes(`${head} and the rest of it`))).toBe(kind)
})

it.each([
  ['nothing', ''],
  ['an SVG', '<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>'],
  ['a PDF', '%PDF-1.7'],
  ['a GIF', 'GIF89a'],
  ['a TIFF', 'II*\0'],
  ['a web page called a photo', '<!doctype html>'],
  ['a sound in the same box as WebP', 'RIFF\0\0\0\0WAVE'],
  ['a film in the same box as AVIF', '\0\0\0\x20ftypisom'],
])('does not take %s for a photo', (_, head) => {
  expect(photoKind(bytes(head))).toBeUndefined()
})
