import { describe, expect, it } from 'vitest'
import type { RunEvent } from '#shared/bench/run-event'
import { isReady, partsOf, stepAfter, waitLeft } from '#shared/bench/run-parts'
import { runState } from '#shared/bench/run-state'
import { workNow } from '#shared/bench/work-now'
import { cupNow, runTimers, timerLeft } from '#shared/bench/run-timers'
import { at, event, id, PERCH, planOf } from './finish'

const plan = planOf(PERCH, 6)
const LAY = `lay:${id('coat', 1)}`
const REST = `rest:${id('coat', 1)}`
const clock = (minutes: number) => Date.parse(at(minutes))
const stand = (events: readonly RunEvent[]) => partsOf(plan, runState(events)).map(part => [part.step?.id, part.pieces])
const done = (n: number, stepId: string, pieces?: number[], starts?: string) => event(n, { v: 1, kind: 'step-done', stepId, pieces, starts })
const laid = (n: number, pieces: number[], passes: number) => event(n, { v: 1, kind: 'pass-laid', coatId: id('coat', 1), pieces, passes })

/** Four pieces have their coat and rest from minute 10, two from minute 13. */
const SPLIT = [
  done(1, 'prepare'), done(2, `mix:${id('coat', 1)}`), laid(3, [1, 2, 3, 4], 3),
  done(10, LAY, [1, 2, 3, 4], REST), laid(11, [5, 6], 3),
]

describe('a batch', () => {
  it('goes on as one while nobody goes ahead', () => {
    expect(stand([])).toEqual([['prepare', [1, 2, 3, 4, 5, 6]]])
    expect(stand(SPLIT.slice(0, 3))).toEqual([[LAY, [1, 2, 3, 4, 5, 6]]])
  })

  it('is split by going on with what is done, and is one again when the rest has caught up', () => {
    expect(stand(SPLIT)).toEqual([[LAY, [5, 6]], [REST, [1, 2, 3, 4]]])
    expect(stand([...SPLIT, done(13, LAY, [5, 6], REST)])).toEqual([[REST, [1, 2, 3, 4, 5, 6]]])
  })

  it('shows what there is to do rather than what only waits', () => {
    const both = [...SPLIT, done(13, LAY, [5, 6], REST)]
    expect(workNow(plan, runState(SPLIT), clock(11))?.pieces).toEqual([5, 6])
    expect(workNow(plan, runState(both), clock(14))).toMatchObject({ step: { id: `clean:${id('coat', 1)}` }, pieces: [1, 2, 3, 4, 5, 6], isAhead: true })
    expect(workNow(plan, runState([done(20, 'prepare', [1])]), clock(21))?.pieces).toEqual([2, 3, 4, 5, 6])
  })

  it('is through when every piece has had every step', () => {
    const all = plan.steps.map((step, n) => done(n + 1, step.id))
    expect(stand(all)).toEqual([[undefined, [1, 2, 3, 4, 5, 6]]])
    expect(workNow(plan, runState(all), clock(99))).toBeUndefined()
  })

  it('knows the step that follows for its own pieces only', () => {
    const large = planOf(PERCH, 14)
    const clear = large.steps.findIndex(step => step.id === `lay:${id('coat', 4)}:1`)
    const events = large.steps.slice(0, clear).map((step, n) => done(n + 1, step.id))
    const [part] = partsOf(large, runState(events))
    expect(part?.pieces).toEqual([1, 2, 3, 4, 5, 6, 7])
    expect(stepAfter(large, runState(events), part!)?.id).toBe(`turn:${id('coat', 4)}`)
  })
})

describe('a piece', () => {
  const [lay, rest] = [LAY, REST].map(stepId => plan.steps.find(step => step.id === stepId)!)

  it('is ready when it has all its passes', () => {
    const state = runState([laid(3, [1], 3), laid(4, [2], 2)])
    expect([1, 2, 3].map(piece => isReady(lay!, piece, state, clock(5)))).toEqual([true, false, false])
  })

  it('is ready when its own rest is over, not when another’s is', () => {
    const state = runState([...SPLIT, done(13, LAY, [5, 6], REST)])
    expect([1, 5].map(piece => isReady(rest!, piece, state, clock(16)))).toEqual([true, false])
    expect([1, 5].map(piece => isReady(rest!, piece, state, clock(19)))).toEqual([true, true])
  })

  it('waits anew when its wait is started by hand', () => {
    const again = event(15, { v: 1, kind: 'wait-started', stepId: REST, pieces: [1] })
    expect(waitLeft(rest!, 1, runState([...SPLIT, again]), clock(16))).toBe(5 * 60_000)
    expect(waitLeft(rest!, 2, runState([...SPLIT, again]), clock(16))).toBe(0)
  })
})

describe('timers', () => {
  const both = [...SPLIT, done(13, LAY, [5, 6], REST)]

  it('run for each part by itself, from when its wait began, whenever they are looked at', () => {
    const timers = runTimers(plan, runState(both))
    expect(timers.map(timer => [timer.pieces, timerLeft(timer, clock(14)) / 60_000])).toEqual([[[1, 2, 3, 4], 2], [[5, 6], 5]])
    expect(timers.map(timer => timerLeft(timer, clock(30)))).toEqual([0, 0])
  })

  it('never show more than the whole when the clock of another tablet is ahead', () => {
    expect(timerLeft(runTimers(plan, runState(both))[0]!, clock(2))).toBe(6 * 60_000)
  })

  it('end when their pieces go on', () => {
    expect(runTimers(plan, runState([...both, done(14, REST, [1, 2, 3, 4])])).map(timer => timer.pieces)).toEqual([[5, 6]])
  })

  it('count the cup from when it was mixed until its coats are on every piece', () => {
    expect(cupNow(plan, runState(SPLIT))).toMatchObject({ mixedAt: clock(2), setsAt: null })
    expect(cupNow(plan, runState(both))).toBeUndefined()
    const toClear = plan.steps.filter(step => step.kind !== 'turn' && step.kind !== 'inspect' && step.id !== `lay:${id('coat', 4)}`).map((step, n) => done(n + 1, step.id))
    const cup = cupNow(plan, runState(toClear))
    expect((cup!.setsAt! - cup!.mixedAt) / 60_000).toBe(30)
  })
})
