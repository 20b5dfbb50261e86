import { appCacheName, bringApp, dropOtherApps } from './app-cache'
import type { WorkerScope } from './worker-scope'

/*
 * The background worker: it keeps the application itself on the device, so that a run can be opened without a network. It keeps
 * no page that was drawn for somebody and no answer of the API: what is private lies in the tablet's drawers, which signing out
 * empties. Pages at the bench are one empty shell with its own content policy, nonce and all, as the server sent it.
 */
const scope = self as unknown as WorkerScope
// Written so, since the build looks for these very letters. Which build is the newest is always asked of the server.
const files = (self as unknown as WorkerScope).__WB_MANIFEST.filter(file => !file.url.endsWith('builds/latest.json'))
const paths = new Set(files.map(file => new URL(file.url, scope.location.origin).pathname))

/** The empty page every bench page starts as. */
const SHELL = '/runs/here'
const BENCH_PAGES = /^\/runs\/(?:here|[^/]+\/follow)\/?$/
/** Said by a page when no run is open: the new version may take over. */
const TAKE_OVER = 'take over'
/** A page that does not come within this time counts as not to be had, ms. */
const PATIENCE_MS = 8_000

const cacheName = appCacheName(files)

scope.addEventListener('install', (event) => {
  event.waitUntil(cacheName.then(name => bringApp(name, files, [SHELL])))
})

scope.addEventListener('activate', (event) => {
  event.waitUntil(cacheName.then(dropOtherApps).then(() => scope.clients.claim()))
})

scope.addEventListener('message', (event) => {
  if (event.data === TAKE_OVER) event.waitUntil(scope.skipWaiting())
})

scope.addEventListener('fetch', (event) => {
  const { request } = event
  const { origin, pathname } = new URL(request.url)
  if (request.method !== 'GET' || origin !== scope.location.origin || pathname.startsWith('/api/')) return
  if (request.mode === 'navigate') event.respondWith(BENCH_PAGES.test(pathname) ? shell(request) : page(request))
  else if (paths.has(pathname)) event.respondWith(held(pathname, request))
})

/** The shell as it came with this very version, so that it and its files always belong together. */
async function shell(request: Request): Promise<Response> {
  return await (await caches.open(await cacheName)).match(SHELL) ?? fetch(request)
}

/** Any other page comes from the server and is never kept. When it cannot be had, the way leads to what is here. */
async function page(request: Request): Promise<Response> {
  try {
    return await fetch(request, { signal: AbortSignal.timeout(PATIENCE_MS) })
  }
  catch {
    return Response.redirect(SHELL, 302)
  }
}

async function held(pathname: string, request: Request): Promise<Response> {
  const cache = await caches.open(await cacheName)
  return await cache.match(pathname) ?? fetch(request)
}
