import { sessionCookie } from '#server/http/session-cookie'
import { settings } from '#server/settings'

/**
 * Gives each request one ready runtime configuration: building it anew (Nitro's way) costs more than most answers.
 * The session's part comes from the settings; the library that seals the cookie looks for its password under a name of its own.
 */
export default defineNitroPlugin((nitro) => {
  process.env.NUXT_SESSION_PASSWORD = settings().sessionPassword
  const config = { ...useRuntimeConfig(), session: sessionCookie() }
  nitro.hooks.hook('request', (event) => {
    event.context.nitro ??= {}
    event.context.nitro.runtimeConfig ??= config
  })
})
