// `npm test`: sets up what is missing, runs every check on services of its own, and sums up in the last line.
// `node scripts/test.mjs unit api` runs some steps only: lint, types, unit, reference, build, api, e2e, desk.
// `desk` is run when it is asked for: long walks at the desk, for whoever changes it.
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { ensureDebianPackages } from './lib/debian-packages.mjs'
import { assertNode } from './lib/environment.mjs'
import { ensureNpmPackages } from './lib/npm-packages.mjs'
import { Halt, say, secondsSince, step } from './lib/say.mjs'
import { openTestServices } from './lib/test-env.mjs'
import { runStep, STEPS } from './lib/test-steps.mjs'
import { untilStopped } from './lib/until-stopped.mjs'

// Two lanes for two cores; the browser comes last and has the machine to itself, since it waits for what it sees.
const LANES = [['build', 'api'], ['lint', 'types', 'unit', 'reference']]
const ALONE = ['e2e', 'desk']
/** Steps that are of no use without another one. */
const FIRST = /** @type {Record<string, string>} */ ({ api: 'build', e2e: 'build', desk: 'build' })

function chosenSteps() {
  const asked = process.argv.slice(2)
  const unknown = asked.filter(name => !STEPS[name])
  if (unknown.length > 0) throw new Halt(`There is no step ${unknown.join(', ')}.`, `Steps are: ${Object.keys(STEPS).join(', ')}.`)
  if (asked.length === 0) return new Set(Object.keys(STEPS).filter(name => name !== 'desk'))
  return new Set(asked.flatMap(name => [FIRST[name] ?? name, name]))
}

const tally = { passed: 0, failed: 0, isComplete: false }

await untilStopped(async (closing) => {
  const since = Date.now()
  // Closed last, so that nothing is printed after it.
  await closing.add('The sum', () => {
    const { passed, failed, isComplete } = tally
    say(`${passed} passed, ${failed + (isComplete ? 0 : 1)} failed`)
  })
  assertNode()
  const steps = chosenSteps()
  const chosen = [...steps].flatMap(name => STEPS[name] ?? [])
  await ensureDebianPackages([...new Set(chosen.flatMap(one => one.needs))])
  closing.assertOpen()
  await ensureNpmPackages()
  closing.assertOpen()
  const reports = mkdtempSync(join(tmpdir(), 'countershade-reports-'))
  await closing.add('The reports', () => rmSync(reports, { recursive: true, force: true }))
  const services = chosen.some(one => one.hasServices) ? await step('Starting PostgreSQL, photo store and mail sink', () => openTestServices(closing)) : undefined
  const ground = { services, reports, closing }

  const lane = async (/** @type {string[]} */ names) => {
    const results = []
    for (const name of names) {
      if (steps.has(name)) results.push(await runStep(name, ground))
    }
    return results
  }
  const results = [...(await Promise.all(LANES.map(lane))).flat(), ...await lane(ALONE)]

  say(`\nAll steps (${secondsSince(since)}):`)
  for (const { name, passed, failed, notes, seconds } of results) {
    say(`  ${name.padEnd(10)} ${String(passed).padStart(5)} passed ${String(failed).padStart(4)} failed  ${seconds.padStart(8)}  ${notes.join(', ')}`)
    tally.passed += passed
    tally.failed += failed
  }
  tally.isComplete = true
  return { ended: Promise.resolve(tally.failed === 0 && tally.passed > 0 ? 0 : 1) }
})
