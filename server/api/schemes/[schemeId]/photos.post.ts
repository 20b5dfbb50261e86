import { z } from 'zod'
import { requireContext } from '#server/http/context'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseParams, parseQuery } from '#server/http/parse'
import { readPhotoFile } from '#server/http/read-photo-file'
import { objectStore } from '#server/photos/object-store'
import { takeInPhoto } from '#server/photos/photo-pool'
import { addPhoto } from '#server/services/photos/add-photo'
import { SchemeParams } from '#shared/scheme/scheme-input'

/** The run it was taken of, and the id a tablet gave it there. */
const Query = z.object({ runId: z.uuid().optional(), photoId: z.uuid().optional() })

/** The body is the camera's file itself, so that the sender can show how much of it has gone. */
export default defineApiHandler(async (event) => {
  const ctx = await requireContext(event, 'photo:add')
  const { schemeId } = parseParams(event, SchemeParams)
  const { runId, photoId } = parseQuery(event, Query)
  const photo = await addPhoto(ctx, schemeId, runId ?? null, await readPhotoFile(event), { store: objectStore(), process: takeInPhoto }, photoId)
  setResponseStatus(event, 201)
  return photo
})
