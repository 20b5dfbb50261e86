import { closePhotoThreads } from '#server/photos/photo-pool'
import { closePaintingThreads } from '#server/pictures/painting-threads'
import { closePromiseThreads } from '#server/pictures/promise-threads'

/** The threads that paint pictures, work colours out and take photos in are let go of when the server stops. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('close', async () => {
    await Promise.all([closePaintingThreads(), closePromiseThreads(), closePhotoThreads()])
  })
})
