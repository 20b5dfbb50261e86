import { describe, expect, it } from 'vitest'
import { getRun, getRunEvents } from '#server/services/bench/get-run'
import { listRuns } from '#server/services/bench/list-runs'
import { recordActs } from '#server/services/bench/record-acts'
import type { RunEvent } from '#shared/bench/run-event'
import { passesOn, runState } from '#shared/bench/run-state'
import { RunQuery } from '#shared/bench/run-view'
import { testPerson, testWorkshop } from '../factories'
import { asOwner } from '../database'
import { act, pass, testRun } from './ground'

const FINISH = { v: 1, kind: 'run-finished' } as const
const taken = (events: readonly RunEvent[]) => events.map(({ id }) => ({ id, taken: true }))

describe('acts handed over', () => {
  it('come back as they were, in the order they arrived, with who did them', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const { ctx: bench } = await testPerson({ workshopId, role: 'bench' })
    const events = [act({ v: 1, kind: 'step-done', stepId: 'prepare' }, 60), pass(coatIds[0]!, [1, 2]), pass(coatIds[0]!, [1])]
    expect(await recordActs(bench, run.id, events)).toEqual(taken(events))
    const view = await getRun(ctx, run.id)
    expect(view.events).toMatchObject(events.map(event => ({ ...event, by: { id: bench.personId, name: 'Test bench' } })))
    expect(view.events.map(event => event.seq)).toEqual(view.events.map(event => event.seq).toSorted((a, b) => a - b))
  })

  it('count once however often they are sent, and are taken each time', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const first = pass(coatIds[0]!, [1])
    const second = pass(coatIds[0]!, [1])
    await recordActs(ctx, run.id, [first])
    expect(await recordActs(ctx, run.id, [first, second])).toEqual(taken([first, second]))
    await Promise.all([1, 2, 3].map(() => recordActs(ctx, run.id, [first, second])))
    const { events } = await getRun(ctx, run.id)
    expect(events).toHaveLength(2)
    expect(passesOn(coatIds[0]!, 1, runState(events))).toBe(2)
  })

  it('of several tablets at once are all noted', async () => {
    const { ctx, workshopId } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const tablets = await Promise.all([1, 2, 3, 4].map(() => testPerson({ workshopId, role: 'bench' })))
    await Promise.all(tablets.flatMap(({ ctx: tablet }) => Array.from({ length: 5 }, () => recordActs(tablet, run.id, [pass(coatIds[1]!, [2, 3])]))))
    const state = runState((await getRun(ctx, run.id)).events)
    expect([2, 3].map(piece => passesOn(coatIds[1]!, piece, state))).toEqual([20, 20])
  })

  it('that cannot be of this run are refused one by one, the others are noted', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const [good, noPiece, noCoat] = [pass(coatIds[0]!, [6]), pass(coatIds[0]!, [7]), pass(crypto.randomUUID(), [1])]
    expect(await recordActs(ctx, run.id, [noPiece, good, noCoat])).toEqual([
      { id: noPiece.id, taken: false, reason: 'This run has 6 pieces.' },
      { id: good.id, taken: true },
      { id: noCoat.id, taken: false, reason: 'This revision has no such coat.' },
    ])
    expect((await getRun(ctx, run.id)).events.map(event => event.id)).toEqual([good.id])
  })

  it('never stand in for an act of another run or another workshop', async () => {
    const { ctx } = await testWorkshop()
    const { ctx: elsewhere } = await testWorkshop()
    const [own, other] = [await testRun(ctx), await testRun(elsewhere)]
    const theirs = pass(other.coatIds[0]!, [1])
    await recordActs(elsewhere, other.run.id, [theirs])
    const sameId = { ...pass(own.coatIds[0]!, [1]), id: theirs.id }
    expect(await recordActs(ctx, own.run.id, [sameId])).toMatchObject([{ id: theirs.id, taken: false }])
    const changed = { ...theirs, act: { ...pass(other.coatIds[0]!, [2]).act } }
    expect(await recordActs(elsewhere, other.run.id, [changed])).toMatchObject([{ taken: false }])
    expect((await getRun(elsewhere, other.run.id)).events).toMatchObject([theirs])
  })

  it('are never changed by the server', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const event = pass(coatIds[0]!, [1])
    await recordActs(ctx, run.id, [event])
    await expect(asOwner('update run_events set kind = $2 where id = $1', [event.id, 'other'])).rejects.toThrow('never changed')
  })
})

describe('listening for what others do', () => {
  it('gives what came since a place in the order, and nothing twice', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const [first, second] = [pass(coatIds[0]!, [1]), pass(coatIds[0]!, [2])]
    await recordActs(ctx, run.id, [first])
    const heard = await getRunEvents(ctx, run.id, 0)
    await recordActs(ctx, run.id, [second])
    const later = await getRunEvents(ctx, run.id, heard.events.at(-1)!.seq)
    expect([heard, later].map(view => view.events.map(event => event.id))).toEqual([[first.id], [second.id]])
  })
})

describe('listening while several tablets hand over', () => {
  it('hears every act once and in its order, passing over none that arrived earlier', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    let isOver = false
    const heard: string[] = []
    const listen = async () => {
      let since = 0
      for (let isLast = false; !isLast;) {
        isLast = isOver
        for (const event of (await getRunEvents(ctx, run.id, since)).events) {
          heard.push(event.id)
          since = event.seq
        }
      }
    }
    const listening = listen()
    const events = Array.from({ length: 40 }, () => pass(coatIds[0]!, [1]))
    await Promise.all(Array.from({ length: 8 }, (_, n) => recordActs(ctx, run.id, events.slice(5 * n, 5 * n + 5))))
    isOver = true
    await listening
    expect(heard.toSorted()).toEqual(events.map(event => event.id).toSorted())
    expect(heard).toEqual((await getRun(ctx, run.id)).events.map(event => event.id))
  })
})

describe('finishing', () => {
  it('is noted with the time at the bench, is undone by taking it back, and late acts of another tablet are still noted', async () => {
    const { ctx } = await testWorkshop()
    const { run, coatIds } = await testRun(ctx)
    const finish = act(FINISH, 120)
    await recordActs(ctx, run.id, [finish])
    expect(await getRun(ctx, run.id)).toMatchObject({ finishedAt: finish.doneAt })
    const late = pass(coatIds[0]!, [1])
    expect(await recordActs(ctx, run.id, [late])).toEqual(taken([late]))
    expect(await listRuns(ctx, RunQuery.parse({ state: 'made' }), null)).toMatchObject([{ id: run.id, stands: null }])
    await recordActs(ctx, run.id, [act({ v: 1, kind: 'taken-back', eventId: finish.id })])
    expect(await getRunEvents(ctx, run.id, 0)).toMatchObject({ finishedAt: null })
  })
})
