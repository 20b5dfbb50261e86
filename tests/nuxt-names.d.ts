/** Names that Nuxt puts within reach of the page, for tests that look at composables which use them. */
declare global {
  const useState: typeof import('nuxt/app').useState
  const useRequestFetch: typeof import('nuxt/app').useRequestFetch
}

export {}
