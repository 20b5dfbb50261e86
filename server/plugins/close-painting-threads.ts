import { closePaintingThreads } from '#server/pictures/painting-threads'

/** Painting threads are let go of when the server stops. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('close', closePaintingThreads)
})
