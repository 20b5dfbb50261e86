// What `npm test` runs, step by step.
import { join } from 'node:path'
import { ensureBuild } from './application.mjs'
import { AWSCLI, CHROMIUM, FIREFOX, JUDGES, POSTGRESQL } from './debian-packages.mjs'
import { ROOT } from './environment.mjs'
import { run } from './processes.mjs'
import { Halt, say, secondsSince, step } from './say.mjs'
import { checkCounts, playwrightCounts, vitestCounts } from './test-counts.mjs'
import { openTestApplication } from './test-env.mjs'

/** @typedef {import('./test-counts.mjs').Counts} Counts */
/** @typedef {import('./until-stopped.mjs').Closing} Closing */
/** @typedef {Awaited<ReturnType<typeof import('./test-env.mjs').openTestServices>>} Services */
/** @typedef {{ services: Services | undefined, reports: string, closing: Closing }} Ground */
/** @typedef {{ counts: Counts, output: string }} Outcome */
/** @typedef {{ needs: import('./debian-packages.mjs').DebianPackage[], hasServices: boolean, run: (ground: Ground) => Promise<Outcome> }} Step */

/** No step may take longer than this, so that one that hangs is a failure and not an endless wait. */
const LIMIT_MS = 14 * 60_000

const bin = (/** @type {string} */ path) => join(ROOT, 'node_modules', path)

/** @param {Ground} ground @param {NodeJS.ProcessEnv} [more] */
const options = ({ services }, more = {}) => ({
  cwd: ROOT,
  env: { ...process.env, NO_COLOR: '1', NUXT_TELEMETRY_DISABLED: '1', ...services?.env, ...more },
  limitMs: LIMIT_MS,
})

/** @param {string} script */
const check = script => async (/** @type {Ground} */ ground) => {
  const { code, output } = await run('npm', ['run', '--silent', script], options(ground))
  return { counts: checkCounts(code), output }
}

/** @param {string} project */
const vitest = project => async (/** @type {Ground} */ ground) => {
  const report = join(ground.reports, `${project}.json`)
  const args = [bin('vitest/vitest.mjs'), 'run', '--project', project, '--reporter=default', '--reporter=json', `--outputFile.json=${report}`]
  const { code, output } = await run(process.execPath, args, options(ground))
  return { counts: vitestCounts(report, code), output }
}

/** @returns {Promise<Outcome>} */
async function buildStep() {
  try {
    await ensureBuild((_, work) => work())
    return { counts: checkCounts(0), output: '' }
  }
  catch (error) {
    return { counts: checkCounts(1), output: error instanceof Halt ? error.message : String(error) }
  }
}

/** @param {'e2e' | 'desk'} project @returns {Step['run']} */
const browser = project => async (ground) => {
  const { services, closing, reports } = ground
  if (!services) throw new Error('Browser tests need the services')
  const application = await openTestApplication(services, closing)
  const report = join(reports, `${project}.json`)
  const { code, output } = await run(process.execPath, [bin('@playwright/test/cli.js'), 'test', '--config=playwright.config.ts', `--project=${project}`, '--reporter=list,json'], options(ground, {
    ...application.env,
    PLAYWRIGHT_JSON_OUTPUT_FILE: report,
  }))
  const counts = playwrightCounts(report, code)
  const said = application.output.join('').trim()
  return { counts, output: said === '' ? output : `${output}\nThe server said:\n${said}\n` }
}

/** @type {Record<string, Step>} */
export const STEPS = {
  lint: { needs: [], hasServices: false, run: check('lint') },
  types: { needs: [], hasServices: false, run: check('types') },
  unit: { needs: JUDGES, hasServices: false, run: vitest('unit') },
  reference: { needs: JUDGES, hasServices: false, run: vitest('reference') },
  build: { needs: [], hasServices: false, run: buildStep },
  api: { needs: [POSTGRESQL, AWSCLI, ...JUDGES], hasServices: true, run: vitest('api') },
  e2e: { needs: [POSTGRESQL, CHROMIUM, FIREFOX, ...JUDGES], hasServices: true, run: browser('e2e') },
  desk: { needs: [POSTGRESQL, CHROMIUM, ...JUDGES], hasServices: true, run: browser('desk') },
}

/**
 * Runs one step and says how it went; what a failing step printed is shown in full.
 * @param {string} name
 * @param {Ground} ground
 * @returns {Promise<Counts & { name: string, seconds: string }>}
 */
export async function runStep(name, ground) {
  const since = Date.now()
  ground.closing.assertOpen()
  /** @type {Outcome} */
  let outcome
  try {
    const chosen = STEPS[name]
    if (!chosen) throw new Error(`There is no step ${name}`)
    outcome = await step(name, () => chosen.run(ground))
  }
  catch (error) {
    ground.closing.assertOpen()
    outcome = { counts: { passed: 0, failed: 1, notes: [] }, output: error instanceof Error ? error.stack ?? error.message : String(error) }
  }
  ground.closing.assertOpen()
  const { counts, output } = outcome
  if (counts.failed > 0) say(`\n──── ${name} failed ────\n${output.trimEnd()}\n──── end of ${name} ────\n`)
  return { name, ...counts, seconds: secondsSince(since) }
}
