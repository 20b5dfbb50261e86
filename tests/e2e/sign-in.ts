import { readFileSync } from 'node:fs'
import type { Browser, Page } from '@playwright/test'

/** A way into the demo workshop, as its set-up wrote it down. */
export interface DemoSignIn { email: string, password: string, role: string }

/** How somebody of a role signs in to the demo workshop. */
export function demo(role: string): DemoSignIn {
  const all = JSON.parse(readFileSync(process.env.TEST_DEMO_SIGN_INS ?? '', 'utf8')) as DemoSignIn[]
  const found = all.find(one => one.role === role)
  if (!found) throw new Error(`The demo lets no ${role} in.`)
  return found
}

/** Waits until a page that the server drew has come alive: presses before that reach nobody. */
export async function alive(page: Page): Promise<void> {
  await page.waitForFunction(() => {
    const nuxt = (window as { useNuxtApp?: () => { isHydrating?: boolean } }).useNuxtApp
    return nuxt?.().isHydrating === false
  })
}

/** Signs in on the way to a page. */
export async function signIn(page: Page, { email, password }: { email: string, password: string }, to = '/workshop'): Promise<void> {
  await page.goto(to)
  await alive(page)
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password').fill(password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL(url => url.pathname === to.split('?')[0])
  await alive(page)
}

/** What a page must never say to its console: refused by the content policy, or drawn differently by server and browser. */
export function breachesOf(page: Page): string[] {
  const breaches: string[] = []
  page.on('console', (message) => {
    if (/content security policy|hydration/i.test(message.text())) breaches.push(message.text())
  })
  page.on('pageerror', error => breaches.push(error.message))
  return breaches
}

/** A browser of one's own for somebody of the demo workshop, at a page. */
export async function enter(browser: Browser, role: string, to: string): Promise<{ page: Page, breaches: string[] }> {
  const page = await (await browser.newContext()).newPage()
  const breaches = breachesOf(page)
  await signIn(page, demo(role), to)
  return { page, breaches }
}
