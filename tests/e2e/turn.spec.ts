import { expect, test, type Page } from '@playwright/test'
import { bundled } from './turn/bundle'
import type { turning as Turning } from './turn/page'

/** The blank turns in a real browser: three.js, shaders and the thread that lays the sheets, on a page of their own. */

declare const turning: typeof Turning

const [WIDTH, HEIGHT, SURROUND] = [420, 204, 119]
let page: Page

test.describe.configure({ mode: 'serial', timeout: 300_000 })

test.beforeAll(async ({ browser }) => {
  const [script, worker] = await Promise.all([bundled('tests/e2e/turn/page.ts'), bundled('app/workers/turn.worker.ts')])
  page = await browser.newPage({ viewport: { width: 700, height: 400 }, deviceScaleFactor: 1 })
  await page.route('http://turn.test/**', (route) => {
    const { pathname } = new URL(route.request().url())
    if (pathname.endsWith('.ts')) return route.fulfill({ body: worker, contentType: 'text/javascript' })
    if (pathname === '/page.js') return route.fulfill({ body: script, contentType: 'text/javascript' })
    return route.fulfill({
      contentType: 'text/html',
      body: `<!doctype html><canvas tabindex="0" style="display:block;width:${WIDTH}px;height:${HEIGHT}px"></canvas><script type="module" src="/page.js"></script>`,
    })
  })
  await page.goto('http://turn.test/')
  await page.waitForFunction(() => 'turning' in globalThis)
})

test.afterAll(() => page.close())

/** Shows a look and waits until its fine sheets are there. */
async function show(name: string, more = {}): Promise<void> {
  await page.evaluate(async ([look, wish]) => turning.show(look, 3, wish), [name, more] as const)
  await expect.poll(() => page.evaluate(() => turning.state().stage), { timeout: 90_000 }).toBe('fine')
}

for (const name of ['perch', 'roach', 'ember']) {
  test(`the ${name}, not turned, is the side view`, async () => {
    await show(name, { clear: false })
    await page.evaluate(() => turning.turnTo(0, 0))
    const far = await page.evaluate(look => turning.fromSideView(look, false), name)
    expect(far.count).toBeGreaterThan(0.06 * WIDTH * HEIGHT)
    expect(far.half).toBeLessThan(1.2)
    expect(far.most).toBeLessThan(6)
  })
}

test('stands on exactly the grey of the page, from every side', async () => {
  await show('roach')
  for (const [turn, tip] of [[0, 0], [60, 20], [180, 0], [-100, -70]] as const) {
    await page.evaluate(([a, b]) => turning.turnTo(a, b), [turn, tip] as const)
    const { border, share } = await page.evaluate(() => turning.onSurround())
    for (const colour of border) expect(colour).toEqual([SURROUND, SURROUND, SURROUND, 255])
    expect(share).toBeGreaterThan(0.02)
  }
})

test('a pearl goes from face to flop as it turns in the light, further than a plain white does', async () => {
  const swing = async (name: string) => {
    await show(name, { clear: false })
    const lightness = async (tip: number) => {
      await page.evaluate(at => turning.turnTo(0, at), tip)
      return page.evaluate(() => turning.middleLightness())
    }
    const [face, flop] = [await lightness(-25), await lightness(35)]
    return { face, flop, ratio: face / flop }
  }
  const [pearl, white] = [await swing('pearl'), await swing('white')]
  expect(pearl.face).toBeGreaterThan(pearl.flop + 10)
  expect(pearl.ratio).toBeGreaterThan(1.15 * white.ratio)
})

test('turns by drag and by key, and says how far', async () => {
  await show('perch')
  const words = () => page.evaluate(() => turning.state().words)
  await page.evaluate(() => turning.turnTo(0, 0))
  await page.mouse.move(220, 100)
  await page.mouse.down()
  await page.mouse.move(150, 100, { steps: 4 })
  await page.mouse.up()
  expect(await words()).toBe('turned 37° to the tail')
  await page.locator('canvas').press('Home')
  expect(await words()).toBe('left side')
  await page.locator('canvas').press('ArrowRight')
  await page.locator('canvas').press('ArrowDown')
  expect(await words()).toBe('turned 5° to the nose, tipped 5° to the back')
})

test('draws again what it drew when the graphics processor comes back', async () => {
  await show('perch')
  await page.evaluate(() => turning.turnTo(30, 10))
  const before = await page.evaluate(() => turning.shown())
  await page.evaluate(() => turning.lose())
  await expect.poll(() => page.evaluate(() => turning.state().trouble)).toBe('lost')
  await page.evaluate(() => turning.giveBack())
  await expect.poll(() => page.evaluate(() => turning.state().trouble)).toBe(null)
  const after = await page.evaluate(() => turning.shown())
  const changed = before.filter((value, i) => Math.abs(value - after[i]!) > 2).length
  expect(changed).toBeLessThan(0.002 * before.length)
})
