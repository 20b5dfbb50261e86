import type {} from 'nuxt-security'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { build } from 'esbuild'

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
  // The sealed cookie's password comes from the settings at start; without a value here the module would write one into .env.
  runtimeConfig: { session: { password: 'set from SESSION_PASSWORD when the server starts' } },
  alias: { '#shared': here('./shared'), '#server': here('./server') },
  compatibilityDate: '2026-11-01',
  nitro: {
    plugins: ['~~/server/boot/runtime-config.ts'],
    hooks: {
      // Pictures are painted on threads of their own, which start from one file that stands by itself.
      compiled: async (nitro) => {
        await build({
          entryPoints: [here('./server/pictures/paint-picture.ts')],
          outfile: join(nitro.options.output.serverDir, 'workers/paint-picture.mjs'),
          alias: { '#shared': here('./shared'), '#server': here('./server') },
          bundle: true, platform: 'node', format: 'esm', target: 'node20', logLevel: 'warning',
        })
      },
    },
  },
  typescript: { strict: true, tsConfig: { compilerOptions: { noUncheckedIndexedAccess: true } } },
  telemetry: false,
  hooks: {
    // The session is answered by our own route; the module's routes would be a second door.
    'nitro:config': (nitro) => {
      nitro.handlers = nitro.handlers?.filter(handler => handler.route !== '/api/_auth/session')
    },
  },
  auth: { loadStrategy: 'none' },
  eslint: { config: { stylistic: true } },
  tailwindcss: { cssPath: '~/assets/css/tailwind.css', viewer: false },
})
