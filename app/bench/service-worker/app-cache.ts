/** A file of the application; a name that changes with its content needs no revision. */
export interface AppFile { url: string, revision: string | null }

const PREFIX = 'countershade-app-'

/** The cache of one version of the application, named after all its files. */
export async function appCacheName(files: readonly AppFile[]): Promise<string> {
  const text = new TextEncoder().encode(files.map(({ url, revision }) => `${url} ${revision ?? ''}`).join('\n'))
  const digest = await crypto.subtle.digest('SHA-256', text)
  return PREFIX + [...new Uint8Array(digest).slice(0, 8)].map(byte => byte.toString(16).padStart(2, '0')).join('')
}

/** Brings every file here, whole or not at all; what an earlier version holds under the same lasting name is not asked for again. */
export async function bringApp(name: string, files: readonly AppFile[], shells: readonly string[]): Promise<void> {
  const cache = await caches.open(name)
  await inGroups(files, 8, async ({ url, revision }) => {
    const held = revision === null ? await caches.match(url) : undefined
    await cache.put(url, held ?? await ask(url))
  })
  // Asked for without a cookie, so that a shell can hold nothing of anybody's.
  for (const shell of shells) await cache.put(shell, await ask(shell))
}

async function ask(url: string): Promise<Response> {
  const answer = await fetch(url, { cache: 'reload', credentials: 'omit' })
  if (!answer.ok || answer.redirected) throw new Error(`${url} could not be brought here: ${answer.status}`)
  return answer
}

async function inGroups<T>(all: readonly T[], size: number, work: (one: T) => Promise<void>): Promise<void> {
  for (let from = 0; from < all.length; from += size) await Promise.all(all.slice(from, from + size).map(work))
}

/** Lets go of earlier versions. */
export async function dropOtherApps(name: string): Promise<void> {
  const others = (await caches.keys()).filter(each => each.startsWith(PREFIX) && each !== name)
  await Promise.all(others.map(each => caches.delete(each)))
}
