import { expect, test } from '@playwright/test'
import { bundlePages, lawFiles } from '../browser-checks/bundle-page'
import { openFirefox } from '../browser-checks/firefox'
import type { LawsReport } from '../browser-checks/reports'
import { servePages, type PageServer } from '../browser-checks/serve-pages'

let pages: PageServer

test.beforeAll(async () => {
  pages = await servePages(await bundlePages())
})
test.afterAll(() => pages.close())

test.describe('published checks and laws', () => {
  function expectAllHeld(report: LawsReport) {
    expect(report.failures).toEqual([])
    expect(report.files.filter(({ failure }) => failure !== null)).toEqual([])
    expect(report.files.map(({ path }) => path)).toEqual(lawFiles())
    expect(report.passed).toBeGreaterThan(150)
  }

  test('hold in Chromium', async ({ page }) => {
    const reported = pages.report(60_000)
    await page.goto(pages.address('laws-page'))
    expectAllHeld(await reported as LawsReport)
  })

  test('hold in Firefox', async () => {
    const reported = pages.report(90_000)
    const close = openFirefox(pages.address('laws-page'))
    try {
      expectAllHeld(await reported as LawsReport)
    }
    finally {
      close()
    }
  })
})

test.describe('engines of pictures', () => {
  test('agree with double precision in Chromium', async ({ page }) => {
    const reported = pages.report(110_000)
    await page.goto(pages.address('engines-page'))
    console.log(JSON.stringify(await reported, null, 1))
  })
})
