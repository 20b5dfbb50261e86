import { setResponseHeaders } from 'h3'
import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams } from '#server/http/parse'
import { writeSchemeFile } from '#server/services/files/write-scheme-file'
import { fileName } from '#shared/files/file-name'
import { SchemeParams } from '#shared/scheme/scheme-input'

export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'scheme:read')
  const { schemeId } = parseParams(event, SchemeParams)
  const file = await writeSchemeFile(ctx, schemeId)
  setResponseHeaders(event, {
    'cache-control': 'private, no-store',
    'content-disposition': `attachment; filename="${fileName(file.scheme.name, 'scheme.json')}"`,
  })
  return file
})
