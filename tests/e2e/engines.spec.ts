import { expect, type Page, test } from '@playwright/test'
import type { EngineReport } from '../browser-checks/agreement/agreement-report'
import { bundlePages, graphicsFiles, lawFiles } from '../browser-checks/bundle-page'
import { openFirefox } from '../browser-checks/firefox'
import type { TestReport } from '../browser-checks/reports'
import { servePages, type PageServer } from '../browser-checks/serve-pages'

/** A report comes within this, or the test says that none did. */
const WITHIN_MS = 240_000
test.describe.configure({ timeout: WITHIN_MS + 60_000 })

let pages: PageServer | undefined

/** Serves the pages that a group of tests needs. */
function withPages(...scripts: string[]) {
  test.beforeAll(async () => {
    pages = await servePages(await bundlePages(...scripts))
  })
  test.afterAll(() => pages?.close())
}

/** What a page has to report in the end, once a browser has been sent to its address. */
async function reportOf<Report>(script: string, send: (address: string) => Promise<unknown>): Promise<Report> {
  const reported = pages!.report(WITHIN_MS)
  // Heard of only after the browser was sent, a report that fails at once must not count as unheard.
  reported.catch(() => undefined)
  await send(pages!.address(script))
  return await reported as Report
}

function expectAllHeld(report: TestReport, files: string[], least: number) {
  expect(report.failures).toEqual([])
  expect(report.files).toEqual(files)
  expect(report.passed).toBeGreaterThanOrEqual(least)
}

async function inFirefox<Report>(script: string): Promise<Report> {
  let close = () => {}
  return await reportOf<Report>(script, async (address) => {
    close = openFirefox(address)
  }).finally(() => close())
}

/** CIEDE2000 at most 0.5 and 0.1 on the mean, on a thousand stacks drawn by chance and on every finish of the demo wall. */
function expectAgreement({ engine, stacks, finishes, ms }: EngineReport) {
  test.info().annotations.push({ type: engine, description: `${Math.round(ms)} ms for the demo wall; stacks ${stacks.most.toFixed(4)} at most` })
  expect(stacks.samples).toBeGreaterThan(1000)
  expect(Object.keys(finishes).length).toBeGreaterThanOrEqual(9)
  for (const [of, { most, mean }] of Object.entries({ ...finishes, 'random stacks': stacks })) {
    expect(most, `${engine}, ${of}`).toBeLessThanOrEqual(0.5)
    expect(mean, `${engine}, ${of}`).toBeLessThanOrEqual(0.1)
  }
}

/** Collects what nobody holds any more as long as the page's title asks for it, until its report is done. */
async function collectWhenAsked(page: Page) {
  const browser = await page.context().newCDPSession(page)
  for (let title = ''; title !== 'done'; title = await page.title()) {
    if (title === 'collect') await browser.send('HeapProfiler.collectGarbage')
    await page.waitForTimeout(100)
  }
}

test.describe('published checks and laws', () => {
  withPages('laws-page')

  test('hold in Chromium', async ({ page }) => {
    expectAllHeld(await reportOf<TestReport>('laws-page', address => page.goto(address)), lawFiles(), 300)
  })

  test('hold in Firefox', async () => {
    expectAllHeld(await inFirefox<TestReport>('laws-page'), lawFiles(), 300)
  })
})

test.describe('engines of pictures', () => {
  withPages('engines-page', 'engines-worker', 'graphics-page')

  test('all agree with double precision in a thread of Chromium', async ({ page }) => {
    const reports = await reportOf<EngineReport[]>('engines-page', address => page.goto(address))
    expect(reports.map(({ engine }) => engine)).toEqual(['plain', 'simd', 'webgl2'])
    reports.forEach(expectAgreement)
  })

  test('agree with double precision in a thread of Firefox', async () => {
    const reports = await inFirefox<EngineReport[]>('engines-page')
    expect(reports.map(({ engine }) => engine)).toEqual(expect.arrayContaining(['plain', 'simd']))
    reports.forEach(expectAgreement)
  })

  test('on the graphics processor hand over what changed, let go, and live through its loss', async ({ page }) => {
    const report = reportOf<TestReport>('graphics-page', address => page.goto(address))
    await collectWhenAsked(page)
    expectAllHeld(await report, graphicsFiles(), 19)
  })
})
