import { closePhotoThreads } from '#server/photos/photo-pool'
import { closePaintingThreads } from '#server/pictures/painting-threads'

/** The threads that paint pictures and take photos in are let go of when the server stops. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('close', async () => {
    await Promise.all([closePaintingThreads(), closePhotoThreads()])
  })
})
