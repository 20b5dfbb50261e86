import { settings } from '#server/settings'

const YEAR = 365 * 24 * 3600

/**
 * What the security headers owe to where this server is reached and how it was built: only a workshop behind https is
 * held to https, and the development server may put styles in place as they are edited.
 */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('nuxt-security:routeRules', (rules) => {
    const headers = rules['/**']?.headers
    if (!headers) return
    const policy = headers.contentSecurityPolicy
    if (settings().publicUrl.startsWith('https:')) {
      headers.strictTransportSecurity = { maxAge: YEAR, includeSubdomains: false }
      if (policy) policy['upgrade-insecure-requests'] = true
    }
    if (import.meta.dev && policy) {
      policy['style-src'] = ['\'self\'', '\'unsafe-inline\'']
      policy['connect-src'] = ['\'self\'', 'ws:']
    }
  })

  nitro.hooks.hook('request', (event) => {
    setResponseHeader(event, 'x-content-type-options', 'nosniff')
    setResponseHeader(event, 'referrer-policy', 'same-origin')
    // An answer of the API is data: opened as a page it may do nothing.
    if (event.path.startsWith('/api/'))
      setResponseHeader(event, 'content-security-policy', 'default-src \'none\'; frame-ancestors \'none\'')
  })
})
