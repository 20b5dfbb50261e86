import { type ChildProcess, spawn } from 'node:child_process'
import { existsSync, readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { setTimeout as delay } from 'node:timers/promises'
import { type Browser, chromium, type Page } from '@playwright/test'

const ARGS = [
  '--headless=new', '--no-sandbox', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync',
  // Small and without a graphics card: it starts thirty times.
  '--disable-gpu', '--disable-extensions', '--disable-component-extensions-with-background-pages', '--remote-debugging-port=0', '--window-size=420,900', 'about:blank',
]
const PATIENCE_MS = 20_000

/** A tablet: a browser with a memory of its own, whose process can be ended as a battery ends it. */
export interface Tablet {
  page: Page
  /** Ends every process of it at once, without a word. */
  kill: () => Promise<void>
}

/** Starts a browser on a profile that outlives it. */
export async function startTablet(profile: string): Promise<Tablet> {
  const told = join(profile, 'DevToolsActivePort')
  rmSync(told, { force: true })
  // What a killed browser leaves behind says that it still runs.
  for (const name of ['SingletonLock', 'SingletonCookie', 'SingletonSocket']) rmSync(join(profile, name), { force: true })
  const process_ = spawn('/usr/bin/chromium', [...ARGS, `--user-data-dir=${profile}`], { detached: true, stdio: 'ignore' })
  const browser = await joined(told, process_)
  const [context] = browser.contexts()
  if (!context) throw new Error('The browser has no window')
  return {
    page: context.pages()[0] ?? await context.newPage(),
    async kill() {
      const ended = new Promise(resolve => process_.once('exit', resolve))
      if (process_.pid !== undefined) process.kill(-process_.pid, 'SIGKILL')
      await ended
      await browser.close().catch(() => undefined)
    },
  }
}

async function joined(told: string, process_: ChildProcess): Promise<Browser> {
  const until = Date.now() + PATIENCE_MS
  while (Date.now() < until && process_.exitCode === null) {
    const [port] = existsSync(told) ? readFileSync(told, 'utf8').split('\n') : []
    if (port) return chromium.connectOverCDP(`http://127.0.0.1:${port}`)
    await delay(20)
  }
  throw new Error('The browser did not start')
}
