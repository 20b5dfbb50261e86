import fc from 'fast-check'
import { describe, it } from 'vitest'
import { expectKept, schedulesOf } from '../../bench-model/any-schedule'
import { PaperNotebook } from '../../bench-model/notebook'
import { PIECES } from '../../bench-model/schedule'
import { PERCH, planOf } from './finish'

/** Schedules for each number of tablets; `npm run drill:bench` asks for more. */
const RUNS = Number(process.env.BENCH_DRILL_SCHEDULES ?? 800)
const SEED = process.env.BENCH_DRILL_SEED === undefined ? undefined : Number(process.env.BENCH_DRILL_SEED)
const plan = planOf(PERCH, PIECES)

describe('whatever happens to acts between the bench and the notebook', () => {
  it.each([1, 2, 3])('with %i tablets: each that was shown as kept arrives once, and all stand where in-order-once stands', async (tablets) => {
    await fc.assert(fc.asyncProperty(schedulesOf(plan, tablets), async (schedule) => {
      await expectKept(schedule, tablets, new PaperNotebook(plan))
    }), { numRuns: RUNS, seed: SEED })
  }, 3_600_000)
})
