// How many tests passed and failed, read from what the runners report.
import { existsSync, readFileSync } from 'node:fs'

/** @typedef {{ passed: number, failed: number, notes: string[] }} Counts */

/** @param {string} file */
function readReport(file) {
  try {
    return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : undefined
  }
  catch {
    return undefined
  }
}

/**
 * A run without a single test, or one that failed without saying which test, is a failure of its own.
 * @param {Counts} counts
 * @param {number} exitCode
 * @returns {Counts}
 */
function settle({ passed, failed, notes }, exitCode) {
  if (failed > 0) return { passed, failed, notes }
  if (passed === 0) return { passed, failed: 1, notes: [...notes, 'no test was executed'] }
  if (exitCode !== 0) return { passed, failed: 1, notes: [...notes, `the runner ended with ${exitCode}`] }
  return { passed, failed, notes }
}

/**
 * Counts of a Vitest JSON report; a file that could not be loaded counts as one failed test.
 * @param {string} file
 * @param {number} exitCode
 * @returns {Counts}
 */
export function vitestCounts(file, exitCode) {
  const report = readReport(file)
  if (!report) return settle({ passed: 0, failed: 0, notes: ['there is no report'] }, exitCode)
  /** @type {{ status: string, assertionResults: unknown[] }[]} */
  const files = report.testResults ?? []
  const unloaded = files.filter(one => one.status === 'failed' && one.assertionResults.length === 0).length
  const left = (report.numPendingTests ?? 0) + (report.numTodoTests ?? 0)
  const notes = left > 0 ? [`${left} skipped`] : []
  return settle({ passed: report.numPassedTests ?? 0, failed: (report.numFailedTests ?? 0) + unloaded, notes }, exitCode)
}

/**
 * Counts of a Playwright JSON report; a test that passed only when it was tried again passed, and is mentioned.
 * @param {string} file
 * @param {number} exitCode
 * @returns {Counts}
 */
export function playwrightCounts(file, exitCode) {
  const report = readReport(file)
  if (!report) return settle({ passed: 0, failed: 0, notes: ['there is no report'] }, exitCode)
  const { expected = 0, unexpected = 0, flaky = 0, skipped = 0 } = report.stats ?? {}
  const broken = (report.errors ?? []).length
  const notes = [...(flaky > 0 ? [`${flaky} only at a second try`] : []), ...(skipped > 0 ? [`${skipped} skipped`] : [])]
  return settle({ passed: expected + flaky, failed: unexpected + broken, notes }, exitCode)
}

/**
 * A check that is one test as a whole.
 * @param {number} exitCode
 * @returns {Counts}
 */
export const checkCounts = exitCode => (exitCode === 0 ? { passed: 1, failed: 0, notes: [] } : { passed: 0, failed: 1, notes: [] })
