import { createHash } from 'node:crypto'
import { getRequestHeader, setResponseHeader, setResponseHeaders, setResponseStatus } from 'h3'
import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams, parseQuery } from '#server/http/parse'
import { drawLook } from '#server/services/picture/draw-look'
import { wishOf } from '#server/services/picture/wish-of'
import { lookOfScheme } from '#server/services/scheme/look-of-scheme'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import { PICTURE_VERSION } from '#shared/picture/picture-hash'
import { PictureQuery, SchemeParams } from '#shared/scheme/scheme-input'

/** A revision's picture under an address of its own may be kept; any other is asked about each time, which costs no painting. */
const KEEP = { forever: 'private, max-age=31536000, immutable', asked: 'private, no-cache' } as const

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:look')
  const { schemeId } = parseParams(event, SchemeParams)
  const query = parseQuery(event, PictureQuery)
  const { look, tag, isFrozen } = await lookOfScheme(ctx, schemeId, query)

  const wish = wishOf(query)
  const etag = `"${createHash('sha256').update(JSON.stringify([tag, ENGINE_VERSION, PICTURE_VERSION, wish])).digest('hex').slice(0, 32)}"`
  setResponseHeaders(event, {
    'etag': etag,
    'cache-control': isFrozen && (query.revision !== undefined || query.tag !== undefined) ? KEEP.forever : KEEP.asked,
  })
  if (getRequestHeader(event, 'if-none-match')?.includes(etag)) {
    setResponseStatus(event, 304)
    return null
  }
  const drawn = await drawLook(ctx, look, wish)
  setResponseHeader(event, 'content-type', drawn.contentType)
  setResponseHeader(event, 'content-length', drawn.bytes.byteLength)
  return drawn.bytes
})
