import { database } from '#server/db/client'
import { sweepEnded } from '#server/services/people/count-try'

const HOUR = 3_600_000

/** Sweeps out what has ended, once an hour; several processes doing it at once do no harm. */
export default defineNitroPlugin((nitro) => {
  const timer = setInterval(() => {
    sweepEnded(database()).catch(error => console.error('Sweeping failed:', error))
  }, HOUR)
  timer.unref()
  nitro.hooks.hook('close', () => clearInterval(timer))
})
