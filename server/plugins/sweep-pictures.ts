import { database } from '#server/db/client'
import { objectStore } from '#server/photos/object-store'
import { sweepPictures } from '#server/services/picture/sweep-pictures'

const SIX_HOURS = 6 * 3_600_000

/** Forgets pictures that another version has drawn, a few times a day; several processes doing it at once do no harm. */
export default defineNitroPlugin((nitro) => {
  const timer = setInterval(() => {
    sweepPictures(database(), objectStore(), new Date()).catch(error => console.error('Sweeping pictures failed:', error))
  }, SIX_HOURS)
  timer.unref()
  nitro.hooks.hook('close', () => clearInterval(timer))
})
