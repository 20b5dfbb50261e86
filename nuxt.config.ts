import type {} from 'nuxt-security'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { build } from 'esbuild'

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url))

export default defineNuxtConfig({
  modules: ['@nuxt/eslint', '@nuxtjs/tailwindcss', '@pinia/nuxt', 'nuxt-auth-utils', 'nuxt-security', '@vite-pwa/nuxt'],
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
  alias: {
    '#shared': here('./shared'),
    '#server': here('./server'),
    // The sealed cookie's own functions, named so that the page's types find them too: the module gives them to the server by auto-import only.
    '#sealed-session': here('./node_modules/nuxt-auth-utils/dist/runtime/server/utils/session'),
  },
  // A card is read by people we do not know on whatever they have in hand: words and photos, and no script at all.
  routeRules: {
    '/c/**': {
      noScripts: true,
      security: { headers: { referrerPolicy: 'no-referrer', contentSecurityPolicy: { 'script-src': ['\'none\''], 'connect-src': ['\'none\''], 'worker-src': ['\'none\''], 'media-src': ['\'none\''] } } },
    },
    // Bench pages are one empty shell that a tablet keeps: what they show lies on the tablet, so the server draws nothing of it.
    '/runs/here': { ssr: false },
    '/runs/*/follow': { ssr: false },
  },
  compatibilityDate: '2026-11-01',
  nitro: {
    plugins: ['~~/server/boot/runtime-config.ts', '~~/server/boot/security-headers.ts'],
    hooks: {
      // Pictures are painted and photos taken in on threads of their own, each of which starts from a file that stands by itself.
      compiled: async (nitro) => {
        await build({
          entryPoints: [here('./server/pictures/paint-picture.ts'), here('./server/pictures/zone-promises.ts'), here('./server/photos/take-in-photo.ts')],
          outdir: join(nitro.options.output.serverDir, 'workers'),
          entryNames: '[name]',
          outExtension: { '.js': '.mjs' },
          alias: { '#shared': here('./shared'), '#server': here('./server') },
          external: ['sharp'],
          bundle: true, platform: 'node', format: 'esm', target: 'node20', logLevel: 'warning',
        })
      },
    },
  },
  // The turning view has a name of its own, so that a tablet at the bench can leave it out.
  vite: { $client: { build: { rollupOptions: { output: { chunkFileNames: ({ name }) => name === 'turn-scene' ? '_nuxt/turn-scene-[hash].js' : '_nuxt/[hash].js' } } } } },
  typescript: { strict: true, tsConfig: { compilerOptions: { noUncheckedIndexedAccess: true } } },
  telemetry: false,
  hooks: {
    // The session is answered by our own route; the module's routes would be a second door.
    'nitro:config': (nitro) => {
      nitro.handlers = nitro.handlers?.filter(handler => handler?.route !== '/api/_auth/session')
    },
  },
  auth: { loadStrategy: 'none' },
  eslint: { config: { stylistic: true } },
  // The application as it is kept on a tablet. It is registered, and gives way to a new version, in app/bench/device/app-worker.ts.
  pwa: {
    strategies: 'injectManifest',
    srcDir: 'bench/service-worker',
    filename: 'worker.ts',
    registerType: 'prompt',
    injectRegister: false,
    client: { registerPlugin: false },
    injectManifest: {
      globPatterns: ['**/*.{js,mjs,css,woff2,wasm,svg,webp}', 'icon-*.png'],
      // Nothing is turned at the bench: a tablet need not hold three.js.
      globIgnores: ['**/turn-scene-*.js'],
      maximumFileSizeToCacheInBytes: 6 * 1024 ** 2,
    },
    manifest: {
      id: '/',
      name: 'Countershade',
      short_name: 'Countershade',
      description: 'A notebook for layered paint, from the first idea to the bench',
      lang: 'en',
      start_url: '/runs',
      scope: '/',
      display: 'standalone',
      background_color: '#929292',
      theme_color: '#161616',
      icons: [
        { src: '/icon-192.png', sizes: '192x192', type: 'image/png' },
        { src: '/icon-512.png', sizes: '512x512', type: 'image/png' },
        { src: '/icon-maskable-512.png', sizes: '512x512', type: 'image/png', purpose: 'maskable' },
      ],
    },
  },
  // What depends on the address and on development is added at start: server/boot/security-headers.ts.
  security: {
    headers: {
      contentSecurityPolicy: {
        'default-src': ['\'none\''],
        'base-uri': ['\'none\''],
        'connect-src': ['\'self\''],
        'font-src': ['\'self\''],
        'form-action': ['\'self\''],
        'frame-ancestors': ['\'none\''],
        'img-src': ['\'self\'', 'blob:', 'data:'],
        'manifest-src': ['\'self\''],
        'media-src': ['\'self\'', 'blob:'],
        'object-src': ['\'none\''],
        'script-src': ['\'self\'', '\'nonce-{{nonce}}\'', '\'strict-dynamic\'', '\'wasm-unsafe-eval\''],
        'script-src-attr': ['\'none\''],
        'style-src': ['\'self\'', '\'nonce-{{nonce}}\''],
        'worker-src': ['\'self\'', 'blob:'],
        'upgrade-insecure-requests': false,
      },
      crossOriginEmbedderPolicy: false,
      referrerPolicy: 'same-origin',
      strictTransportSecurity: false,
      xFrameOptions: 'DENY',
      permissionsPolicy: { 'camera': ['self'], 'fullscreen': ['self'], 'display-capture': [], 'geolocation': [], 'microphone': [] },
    },
    // Bodies, tries and origins are counted and checked by server/http and server/middleware, which count what really arrives.
    requestSizeLimiter: false,
    rateLimiter: false,
    xssValidator: false,
    corsHandler: false,
    removeLoggers: false,
  },
  tailwindcss: { cssPath: '~/assets/css/tailwind.css', viewer: false },
})
