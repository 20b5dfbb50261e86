import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { checkCounts, playwrightCounts, vitestCounts } from '../../../scripts/lib/test-counts.mjs'

const folder = mkdtempSync(join(tmpdir(), 'counts-'))
afterAll(() => rmSync(folder, { recursive: true }))

function report(content: unknown): string {
  const file = join(folder, 'report.json')
  writeFileSync(file, typeof content === 'string' ? content : JSON.stringify(content))
  return file
}

describe('the sum of a test run', () => {
  it('is what Vitest counted', () => {
    expect(vitestCounts(report({ numPassedTests: 7, numFailedTests: 2, numPendingTests: 1, testResults: [] }), 1))
      .toEqual({ passed: 7, failed: 2, notes: ['1 skipped'] })
  })

  it('counts a file that could not be loaded as a failure', () => {
    const testResults = [{ status: 'failed', assertionResults: [] }, { status: 'passed', assertionResults: [{}] }]
    expect(vitestCounts(report({ numPassedTests: 1, numFailedTests: 0, testResults }), 1).failed).toBe(1)
  })

  it('is what Playwright counted, with a second try told', () => {
    expect(playwrightCounts(report({ stats: { expected: 5, unexpected: 1, flaky: 1, skipped: 0 }, errors: [] }), 1))
      .toEqual({ passed: 6, failed: 1, notes: ['1 only at a second try'] })
  })

  it('counts an error outside any browser test as a failure', () => {
    expect(playwrightCounts(report({ stats: { expected: 5, unexpected: 0, flaky: 0, skipped: 0 }, errors: [{}] }), 1).failed).toBe(1)
  })

  it.each([vitestCounts, playwrightCounts])('is a failure when no test was executed (%o)', (counts) => {
    expect(counts(report({ stats: {}, testResults: [] }), 0)).toMatchObject({ passed: 0, failed: 1 })
    expect(counts(report('not JSON'), 0)).toMatchObject({ passed: 0, failed: 1 })
    expect(counts(join(folder, 'missing.json'), 0)).toMatchObject({ passed: 0, failed: 1 })
  })

  it('is a failure when the runner fails without naming a test', () => {
    expect(vitestCounts(report({ numPassedTests: 3, numFailedTests: 0, testResults: [] }), 1)).toMatchObject({ passed: 3, failed: 1 })
  })

  it('counts lint and types as one test each', () => {
    expect([checkCounts(0), checkCounts(2)]).toMatchObject([{ passed: 1, failed: 0 }, { passed: 0, failed: 1 }])
  })
})
