import { type H3Event, setResponseHeaders } from 'h3'
import type { StoredObject } from '#server/photos/object-store'

/** Sends a stored picture. A copy never changes under its name, so whoever may see it may keep it; others may not keep it for them. */
export function sendStored(event: H3Event, stored: StoredObject, keep: 'private, max-age=86400, immutable' | 'private, no-cache'): Uint8Array {
  setResponseHeaders(event, {
    'content-type': stored.contentType,
    'content-length': stored.bytes.byteLength,
    'cache-control': keep,
    'x-content-type-options': 'nosniff',
    'content-disposition': 'inline',
  })
  return stored.bytes
}
