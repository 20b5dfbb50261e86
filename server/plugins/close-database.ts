import { closeDatabase } from '#server/db/client'

/** The database is let go of when the server stops. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('close', closeDatabase)
})
