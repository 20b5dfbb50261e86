import { expect, test } from '@playwright/test'
import type { EngineReport } from '../browser-checks/agreement/agreement-report'
import { bundlePages, graphicsFiles, lawFiles } from '../browser-checks/bundle-page'
import { openFirefox } from '../browser-checks/firefox'
import type { TestReport } from '../browser-checks/reports'
import { servePages, type PageServer } from '../browser-checks/serve-pages'

/** A report comes within this, or the test says that none did. */
const WITHIN_MS = 100_000

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

test.describe('published checks and laws', () => {
  withPages('laws-page')

  test('hold in Chromium', async ({ page }) => {
    expectAllHeld(await reportOf<TestReport>('laws-page', address => page.goto(address)), lawFiles(), 300)
  })

  test('hold in Firefox', async () => {
    let close = () => {}
    const report = await reportOf<TestReport>('laws-page', async (address) => {
      close = openFirefox(address)
    }).finally(() => close())
    expectAllHeld(report, lawFiles(), 300)
  })
})

test.describe('engines of pictures', () => {
  withPages('engines-page', 'engines-worker', 'graphics-page')

  test('agree with double precision in a thread of Chromium', async ({ page }) => {
    console.log(JSON.stringify(await reportOf<EngineReport[]>('engines-page', address => page.goto(address)), null, 1))
  })

  test('on the graphics processor: on a page, losing it, letting go', async ({ page }) => {
    expectAllHeld(await reportOf<TestReport>('graphics-page', address => page.goto(address)), graphicsFiles(), 12)
  })
})
