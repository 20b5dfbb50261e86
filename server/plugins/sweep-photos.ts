import { database } from '#server/db/client'
import { objectStore } from '#server/photos/object-store'
import { sweepPhotoFiles } from '#server/services/photos/sweep-photo-files'

const SIX_HOURS = 6 * 3_600_000

/** Forgets the files of photos that are no more, a few times a day; several processes doing it at once do no harm. */
export default defineNitroPlugin((nitro) => {
  const timer = setInterval(() => {
    sweepPhotoFiles(database(), objectStore(), new Date()).catch(error => console.error('Sweeping photos failed:', error))
  }, SIX_HOURS)
  timer.unref()
  nitro.hooks.hook('close', () => clearInterval(timer))
})
