import AxeBuilder from '@axe-core/playwright'
import { expect, type Page, test } from '@playwright/test'
import { openGate } from './bench/gate'
import { goToLay, openRun, startRunAs } from './bench/run-ground'
import { faultsOfTouch, strayTaps } from './bench/touch'

/* The bench is for gloves and arm's length, in bright and dim light, upright and laid down, in the right hand and the left. */
const SIZES = [{ width: 820, height: 1180 }, { width: 1180, height: 820 }, { width: 390, height: 844 }]

async function dress(page: Page, light: 'bright' | 'dim', hand: 'right' | 'left') {
  const url = new URL(page.url()).origin
  await page.context().addCookies([{ name: 'bench-light', value: light, url }, { name: 'bench-hand', value: hand, url }])
  await page.reload()
  await expect(page.getByRole('heading', { level: 1, name: /^Lay coat/ })).toBeVisible()
}

test.describe('at the bench', () => {
  test('targets, type and contrast are for gloves and distance, and no stray tap takes anything back', async ({ page }) => {
    const base = process.env.TEST_BASE_URL ?? ''
    const runId = await startRunAs(page, base, 12)
    await openRun(page, base, runId)
    await goToLay(page)
    await page.getByRole('button', { name: /^Piece 1, 0 of/ }).click()
    for (const [light, hand] of [['bright', 'right'], ['dim', 'left']] as const) {
      await dress(page, light, hand)
      for (const size of SIZES) {
        await page.setViewportSize(size)
        expect(await faultsOfTouch(page), `${size.width}, ${light}`).toEqual([])
        expect(await strayTaps(page, 13), `${size.width}, ${light}`).toEqual([])
        const next = await page.getByRole('button', { name: /^Next/ }).boundingBox()
        expect(hand === 'right' ? next!.x + next!.width > size.width * 0.9 : next!.x < size.width * 0.1).toBe(true)
      }
      await page.setViewportSize(SIZES[0]!)
      const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']).analyze()
      expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([])
    }
    for (const name of [/differently/, /^This tablet/]) {
      await page.getByRole('button', { name }).click()
      await expect(page.getByRole('dialog')).toBeVisible()
      expect(await faultsOfTouch(page, 'dialog[open]'), String(name)).toEqual([])
      const { violations } = await new AxeBuilder({ page }).include('dialog[open]').withTags(['wcag2a', 'wcag2aa']).analyze()
      expect(violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([])
      await page.keyboard.press('Escape')
    }
  })

  test('a page frozen for half an hour has its timers right at once, and a clock that is set moves none', async ({ page }) => {
    const gate = await openGate(process.env.TEST_BASE_URL ?? '')
    try {
      // Both clocks of the tablet can be turned on: the one on the wall alone, or both, as time passes in a frozen page.
      await page.addInitScript(() => {
        const turned = { wall: 0, both: 0 }
        const [wall, running] = [Date.now.bind(Date), performance.now.bind(performance)]
        Date.now = () => wall() + turned.wall + turned.both
        performance.now = () => running() + turned.both
        Object.assign(window, { turned })
      })
      const runId = await startRunAs(page, gate.url, 4)
      await openRun(page, gate.url, runId)
      await goToLay(page)
      await layAndRest(page)
      await page.getByRole('button', { name: /^Change the timer/ }).click()
      await page.getByRole('button', { name: '30 min' }).click()
      const timer = page.getByRole('timer').first()
      await expect(timer).toHaveText(/^3\d:\d\d$/)
      await expect(page.locator('header')).toContainText('all handed over')
      gate.shut()

      // Held by its debugger nothing of the page runs, as when a browser freezes it; meanwhile half an hour passes.
      const cdp = await page.context().newCDPSession(page)
      await cdp.send('Debugger.enable')
      const held = new Promise<string>(resolve => cdp.once('Debugger.paused', event => resolve(event.callFrames[0]?.callFrameId ?? '')))
      await cdp.send('Debugger.pause')
      const callFrameId = await held
      await cdp.send('Debugger.evaluateOnCallFrame', { callFrameId, expression: 'window.turned.both = 30 * 60_000' })
      await cdp.send('Debugger.resume')
      await cdp.send('Debugger.disable')
      await page.waitForTimeout(250)
      expect(await offBy(page)).toBeLessThanOrEqual(250)
      expect(await timer.innerText()).toMatch(/^[0-5]:\d\d$/)

      await page.evaluate('window.turned.wall = 45 * 60_000')
      await page.waitForTimeout(600)
      expect(await timer.innerText()).toMatch(/^[0-5]:\d\d$/)
      await expect(page.getByText(/clock of this tablet went ahead by 45 minutes/)).toBeVisible()
    }
    finally {
      await gate.close()
    }
  })
})

/** Lays every pass of a coat and goes on to its rest, whose timer begins by itself. */
async function layAndRest(page: Page) {
  const [onAll, timer] = [page.getByRole('button', { name: /^One pass on/ }), page.getByRole('button', { name: /^Change the timer/ })]
  await expect(async () => {
    if (await onAll.isVisible()) await onAll.click({ timeout: 2_000 })
    else await page.getByRole('button', { name: /^Next/ }).click({ timeout: 2_000 })
    await expect(timer).toBeVisible({ timeout: 500 })
  }).toPass({ intervals: [200] })
}

/** How far what the first timer shows is off from what is left of it, ms: 0 while it shows the second that is running. */
async function offBy(page: Page): Promise<number> {
  return page.evaluate(() => {
    const timer = document.querySelector<HTMLElement>('[role=timer]')
    if (!timer) return Infinity
    const [minutes = 0, seconds = 0] = (timer.textContent ?? '').split(':').map(Number)
    const left = Number(timer.dataset.endsAt) - Date.now()
    const shown = (minutes * 60 + seconds) * 1000
    // 2:10 stands for anything over 129 s up to 130 s.
    return left > shown ? left - shown : left <= shown - 1000 ? shown - 1000 - left : 0
  })
}
