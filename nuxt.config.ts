import type {} from 'nuxt-security'
import { fileURLToPath } from 'node:url'

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url))

export default defineNuxtConfig({
  modules: ['@nuxt/eslint', '@nuxtjs/tailwindcss', '@pinia/nuxt', 'nuxt-auth-utils', 'nuxt-security'],
  // The drawing sheet is for us: no built product has it.
  $production: { ignore: ['**/pages/dev/**'] },
  // Path data and tables lie beside the components that draw them.
  components: [{ path: '~/components', extensions: ['vue'] }],
  // Rooms of shared/ and server/ are imported by name, so that arrows stay visible.
  imports: { scan: true },
  devtools: { enabled: false },
  app: { head: { link: [{ rel: 'icon', type: 'image/svg+xml', href: '/favicon.svg' }] } },
  css: [
    '@fontsource-variable/bricolage-grotesque/standard.css',
    '@fontsource-variable/atkinson-hyperlegible-next/wght.css',
    '@fontsource-variable/atkinson-hyperlegible-next/wght-italic.css',
    '@fontsource-variable/atkinson-hyperlegible-mono/wght.css',
    '~/assets/css/tokens.css',
  ],
  alias: { '#shared': here('./shared'), '#server': here('./server') },
  compatibilityDate: '2026-11-01',
  typescript: { strict: true, tsConfig: { compilerOptions: { noUncheckedIndexedAccess: true } } },
  telemetry: false,
  eslint: { config: { stylistic: true } },
  tailwindcss: { cssPath: '~/assets/css/tailwind.css', viewer: false },
})
