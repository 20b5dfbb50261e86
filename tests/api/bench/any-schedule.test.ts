import { setTimeout as delay } from 'node:timers/promises'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { getRun, getRunEvents } from '#server/services/bench/get-run'
import { recordActs } from '#server/services/bench/record-acts'
import { listBottles } from '#server/services/shelf/list-bottles'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { paintUsed } from '#shared/bench/paint-used'
import { inPlace } from '#shared/bench/run-state'
import { runSteps } from '#shared/bench/run-steps'
import { areaCells } from '#shared/scheme/coat-area'
import { expectKept, schedulesOf } from '../../bench-model/any-schedule'
import type { Notebook } from '../../bench-model/notebook'
import { PIECES } from '../../bench-model/schedule'
import { testWorkshop } from '../factories'
import { testRun } from './ground'

const SCHEDULES = 12

describe('whatever happens to acts between the bench and the real notebook', () => {
  it('with 2 tablets: each arrives once, all stand where in-order-once stands, and the shelf has given what was laid', async () => {
    const { ctx } = await testWorkshop()
    const { run: first } = await testRun(ctx, { pieces: PIECES })
    const { body, materials } = await getRun(ctx, first.id)
    const plan = { steps: runSteps({ body, materials }, PIECES), pieces: PIECES }
    const cells = areaCells(prepareBlank(materials.blank.shape))
    const anySchedule = schedulesOf(plan, 2, 20)

    for (const wished of fc.sample(anySchedule, SCHEDULES)) {
      const { run, coatIds, body: own } = await testRun(ctx, { pieces: PIECES })
      const renamed = renameCoats(wished, new Map(plan.steps.flatMap(step => step.kind === 'lay' ? [step.coat.id] : []).map((id, n) => [id, coatIds[n]!])), new Map(body.masks.map((mask, n) => [mask.id, own.masks[n]!.id])))
      const underWay = new Set<Promise<unknown>>()
      const notebook: Notebook = {
        take(events) {
          const taking = recordActs(ctx, run.id, events).finally(() => underWay.delete(taking))
          underWay.add(taking)
          return taking
        },
        since: async place => (await getRunEvents(ctx, run.id, place)).events,
      }
      await expectKept(renamed, 2, notebook, async () => {
        do {
          await Promise.allSettled(underWay)
          await delay(1)
        } while (underWay.size > 0)
      })

      const view = await getRun(ctx, run.id)
      const ownPlan = { steps: runSteps(view, PIECES), pieces: PIECES }
      const used = paintUsed(view, cells, ownPlan, [...view.events].sort(inPlace), view.startBottles)
      const [paint] = view.materials.paints
      const [bottle] = await listBottles(ctx, paint!.id)
      expect(50 - bottle!.ml).toBeCloseTo(Math.min(50, used.reduce((sum, each) => sum + each.ml, 0)), 6)
    }
  }, 120_000)
})

/** The same schedule for a run of another scheme, whose coats and masks have ids of their own. */
function renameCoats<T>(schedule: T, ...names: ReadonlyMap<string, string>[]): T {
  const text = names.flatMap(each => [...each]).reduce((said, [from, to]) => said.replaceAll(from, to), JSON.stringify(schedule))
  return JSON.parse(text) as T
}
