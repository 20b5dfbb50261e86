// A long drill of what may happen to acts between the bench and the notebook: loss, doubling, delay, wrong clocks, full
// storage, tablets switched off in the middle.
//
//   npm run drill:bench                 20 000 schedules for each number of tablets
//   npm run drill:bench -- 100000       so many
//   npm run drill:bench -- 20000 42     with a seed, to see a failure again
import { spawnSync } from 'node:child_process'

const SCHEDULES = 20_000
const [schedules = String(SCHEDULES), seed] = process.argv.slice(2)
if (![schedules, seed ?? '0'].every(word => /^-?\d+$/.test(word))) {
  console.error('Usage: npm run drill:bench -- [schedules] [seed]')
  process.exit(2)
}
const { status } = spawnSync('npx', ['vitest', 'run', '--config', 'vitest.config.ts', '--project', 'unit', 'tests/unit/bench/any-schedule.test.ts'], {
  stdio: 'inherit',
  env: { ...process.env, BENCH_DRILL_SCHEDULES: schedules, ...seed === undefined ? {} : { BENCH_DRILL_SEED: seed } },
})
process.exit(status ?? 1)
