import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { setTimeout as delay } from 'node:timers/promises'
import { expect, type Page, test } from '@playwright/test'
import { type Gate, openGate } from './bench/gate'
import { actsAtServer, goToLay, openRun, startRunAs } from './bench/run-ground'
import { startTablet, type Tablet } from './bench/tablet'
import { alive, demo } from './sign-in'

/*
 * A bench painter opens a run on a tablet and walks into a corner with no reception. The tablet is ended thirty times in the
 * middle of painting; afterwards everything it had shown as kept is in the notebook, once.
 */
const KILLS = 30
const PIECES = 90
/** The tablet ends at any moment of this long after the first tap, ms. */
const WITHIN_MS = 260

let gate: Gate
let profile: string
let tablet: Tablet | undefined

test.beforeAll(async () => {
  gate = await openGate(process.env.TEST_BASE_URL ?? '')
  profile = mkdtempSync(join(tmpdir(), 'countershade-tablet-'))
})
test.afterAll(async () => {
  await tablet?.kill()
  await gate.close()
  rmSync(profile, { recursive: true, force: true, maxRetries: 5, retryDelay: 200 })
})

/** How many acts the tablet says that it keeps; 0 when everything is handed over. */
async function waitingShown(page: Page): Promise<number> {
  const words = page.locator('header [role=status]')
  await expect(words).toContainText(/waiting|all handed over/)
  return Number(/(\d+)\s*waiting/.exec(await words.innerText())?.[1] ?? 0)
}

/** Tells of every count the tablet shows, as it shows it. */
async function watchShown(page: Page, tell: (count: number) => void): Promise<void> {
  await page.exposeFunction('tellShown', tell)
  await page.evaluate(() => {
    const shown = () => Number(document.querySelector('header [role=status] b')?.textContent ?? 0)
    const { tellShown } = window as unknown as { tellShown: (count: number) => void }
    new MutationObserver(() => tellShown(shown())).observe(document.querySelector('header')!, { subtree: true, childList: true, characterData: true })
  })
}

/** Taps piece after piece as fast as a hand that drums. */
async function drum(page: Page): Promise<void> {
  await page.evaluate(() => {
    window.setInterval(() => document.querySelector<HTMLElement>('button[aria-label^="Piece"]:not([aria-disabled]):is([aria-label*=", 0 of"], [aria-label*=", 1 of"], [aria-label*=", 2 of"])')?.click(), 20)
  })
}

/** The ids of the acts that lie on the tablet. */
async function idsOnTablet(page: Page): Promise<string[]> {
  return page.evaluate(() => new Promise<string[]>((resolve, reject) => {
    const opened = indexedDB.open('countershade-bench')
    opened.onerror = () => reject(new Error('The drawers do not open'))
    opened.onsuccess = () => {
      const all = opened.result.transaction('acts').objectStore('acts').getAll()
      all.onsuccess = () => resolve((all.result as { id: string }[]).map(act => act.id))
    }
  }))
}

/** How many acts lie on the tablet, whatever page is open. */
async function waitingHere(page: Page): Promise<number> {
  await page.waitForURL(url => url.pathname === '/sign-in')
  return (await idsOnTablet(page)).length
}

async function signInAgain(page: Page): Promise<void> {
  const { email, password } = demo('bench')
  await alive(page)
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password').fill(password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page.getByRole('heading', { level: 1, name: /^Lay coat/ })).toBeVisible()
}

test(`a run is painted without a network on a tablet that dies ${KILLS} times, and the notebook has every kept act once`, async () => {
  test.setTimeout(480_000)
  tablet = await startTablet(profile)
  const runId = await startRunAs(tablet.page, gate.url, PIECES)
  await openRun(tablet.page, gate.url, runId)

  gate.shut()
  await tablet.page.reload()
  await expect(tablet.page.getByRole('heading', { level: 1, name: 'Make ready' })).toBeVisible()
  await goToLay(tablet.page)
  await expect(tablet.page.locator('header')).toContainText('No network')
  let shown = await waitingShown(tablet.page)
  expect(shown).toBeGreaterThan(0)

  for (let kill = 0; kill < KILLS; kill++) {
    await tablet.kill()
    tablet = await startTablet(profile)
    const { page } = tablet
    await page.goto(`${gate.url}/runs/${runId}/follow`)
    await expect(page.getByRole('heading', { level: 1, name: /^Lay coat/ })).toBeVisible()
    await expect.poll(() => waitingShown(page), `shown as kept before kill ${kill}`).toBeGreaterThanOrEqual(shown)
    await watchShown(page, (count) => {
      shown = Math.max(shown, count)
    })
    await drum(page)
    await delay(20 + Math.random() * WITHIN_MS)
  }
  await tablet.kill()

  tablet = await startTablet(profile)
  const { page } = tablet
  await page.goto(`${gate.url}/runs/${runId}/follow`)
  await expect(page.getByRole('heading', { level: 1, name: /^Lay coat/ })).toBeVisible()
  await expect.poll(() => waitingShown(page)).toBeGreaterThanOrEqual(shown)
  const kept = await idsOnTablet(page)
  expect(kept.length).toBeGreaterThanOrEqual(shown)
  expect(kept.length).toBeGreaterThan(KILLS)

  // The sign-in has ended meanwhile: the acts wait for whoever signs in again.
  await page.context().clearCookies()
  gate.open()
  await page.getByRole('link', { name: 'Sign in' }).click({ timeout: 60_000 })
  expect(await waitingHere(page)).toBe(kept.length)
  await signInAgain(page)
  await expect(page.locator('header')).toContainText('all handed over', { timeout: 60_000 })
  const atServer = await actsAtServer(page, runId)
  expect(atServer.map(each => each.id).sort()).toEqual([...kept].sort())
  expect(new Set(kept).size).toBe(kept.length)
})

test('a tablet that starts without a network leads to the runs that lie on it', async () => {
  if (!tablet) throw new Error('There is no tablet')
  gate.shut()
  const { page } = tablet
  await page.goto(`${gate.url}/schemes`)
  await expect(page.getByRole('heading', { name: 'On this tablet' })).toBeVisible()
  await page.getByRole('link', { name: /Perch, evening water/ }).first().click()
  await expect(page.getByRole('heading', { level: 1, name: /^Lay coat/ })).toBeVisible()
  gate.open()
})

test('signing out empties the tablet, and asks first while something waits', async () => {
  if (!tablet) throw new Error('There is no tablet')
  const { page } = tablet
  gate.shut()
  await page.getByRole('button', { name: /^Piece \d+, [012] of/ }).first().click()
  await expect(page.locator('header')).toContainText('waiting')
  const runId = page.url().split('/').at(-2) ?? ''
  // The way to the notebook is held up, so that something waits while the desk is there.
  await page.route('**/api/runs/*/events', route => route.abort())
  gate.open()
  await page.goto(`${gate.url}/me`)
  await page.getByRole('button', { name: 'Sign out here' }).click()
  const asked = page.getByRole('dialog')
  await expect(asked).toContainText('only on this tablet')
  await asked.getByRole('button', { name: 'Stay signed in' }).click()
  expect((await idsOnTablet(page)).length).toBeGreaterThan(0)
  await page.getByRole('button', { name: 'Sign out here' }).click()
  await asked.getByRole('button', { name: 'Sign out and lose it' }).click()
  await page.waitForURL(url => url.pathname === '/sign-in')
  expect(await idsOnTablet(page)).toEqual([])
  await page.unroute('**/api/runs/*/events')
  await page.goto(`${gate.url}/runs/${runId}/follow`)
  await page.waitForURL(url => url.pathname === '/sign-in')
})
