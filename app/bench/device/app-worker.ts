/** Held by every page that has a run open, in every tab of this tablet. */
const RUN_OPEN = 'countershade-run-open'
const WORKER = '/worker.js'
/** What the worker waits for: see `service-worker/worker.ts`. */
const TAKE_OVER = 'take over'

/** Says that a run is open on this page until the answer is called: no new version of the application takes over meanwhile. */
export function holdRunOpen(): () => void {
  if (!('locks' in navigator)) return () => undefined
  let release: () => void = () => undefined
  const held = new Promise<void>((resolve) => {
    release = resolve
  })
  void navigator.locks.request(RUN_OPEN, { mode: 'shared' }, () => held)
  return () => release()
}

async function isRunOpen(): Promise<boolean> {
  if (!('locks' in navigator)) return true
  const { held = [], pending = [] } = await navigator.locks.query()
  return [...held, ...pending].some(lock => lock.name === RUN_OPEN)
}

/**
 * Keeps the application itself on this tablet. A new version that lies ready takes over now, with the page loaded anew, unless
 * a run is open anywhere on the tablet: then it waits for the next opening.
 */
export async function keepAppHere(isBenchPage: boolean): Promise<void> {
  if (!('serviceWorker' in navigator)) return
  const registration = await navigator.serviceWorker.register(WORKER, { scope: '/' })
  if (!registration.waiting || isBenchPage || await isRunOpen()) return
  navigator.serviceWorker.addEventListener('controllerchange', () => window.location.reload(), { once: true })
  registration.waiting.postMessage(TAKE_OVER)
}

/** Whether the application itself lies on this tablet, so that it opens without a network; waits until it does. */
export async function isAppHere(): Promise<boolean> {
  if (!('serviceWorker' in navigator)) return false
  await navigator.serviceWorker.ready
  return true
}

/** Asks the browser not to clear what lies here when room gets scarce; false when it will not promise. */
export async function askToKeep(): Promise<boolean> {
  return await navigator.storage?.persist?.().catch(() => false) ?? false
}
