import { describe, expect, it } from 'vitest'
import { goingOn, leavingEarly, readiness } from '~/bench/going-on'
import type { RunEvent } from '#shared/bench/run-event'
import { partsOf } from '#shared/bench/run-parts'
import { runState } from '#shared/bench/run-state'
import { at, event, id, PERCH, planOf } from './finish'

const plan = planOf(PERCH, 6)
const LAY = `lay:${id('coat', 1)}`
const REST = `rest:${id('coat', 1)}`
const clock = (minutes: number) => Date.parse(at(minutes))

/** At coat 1, with these passes on these pieces. */
const laying = (...passes: [pieces: number[], passes: number][]): RunEvent[] => [
  event(1, { v: 1, kind: 'step-done', stepId: 'prepare' }), event(2, { v: 1, kind: 'step-done', stepId: `mix:${id('coat', 1)}` }),
  ...passes.map(([pieces, count], n) => event(3 + n, { v: 1, kind: 'pass-laid', coatId: id('coat', 1), pieces, passes: count })),
]

function stand(events: readonly RunEvent[], minutes: number) {
  const state = runState(events)
  const part = partsOf(plan, state)[0]!
  const ready = readiness(part, state, clock(minutes))
  return { state, part, ready, asked: leavingEarly(part, ready, state, clock(minutes)), go: (pieces = part.pieces) => goingOn(plan, state, part, pieces, clock(minutes)) }
}

describe('going on', () => {
  it('asks nothing when every piece has had its coat, and begins the rest with it', () => {
    const { asked, go } = stand(laying([[1, 2, 3, 4, 5, 6], 3]), 5)
    expect(asked).toBeNull()
    expect(go()).toEqual([{ v: 1, kind: 'step-done', stepId: LAY, starts: REST }])
  })

  it('counts and names the pieces that are not done, and lets the others go ahead', () => {
    const { asked, ready, go } = stand(laying([[1, 2, 3, 4], 3], [[5], 1]), 5)
    expect(asked).toMatchObject({ title: 'Two pieces are not done', split: { word: '1 to 4 go on', second: '5 and 6 follow as a second part' }, all: 'All go on as they are' })
    expect(go(ready.ready)).toEqual([{ v: 1, kind: 'step-done', stepId: LAY, pieces: [1, 2, 3, 4], starts: REST }])
  })

  it('notes by itself what a piece goes without', () => {
    const notes = stand(laying([[1, 2, 3, 4, 5], 3], [[6], 1]), 5).go()
    expect(notes).toMatchObject([{ kind: 'deviation', what: 'passes', note: 'Piece 6 went on with 1 of 3 passes.', pieces: [6] }, { kind: 'step-done' }])
    const resting = [...laying([[1, 2, 3, 4, 5, 6], 3]), event(10, { v: 1, kind: 'step-done', stepId: LAY, starts: REST })]
    expect(stand(resting, 14).asked).toMatchObject({ title: 'Six pieces are still waiting', words: '1 to 6 have 2:00 to go.', split: null, all: 'Go on all the same' })
    expect(stand(resting, 14).go()).toMatchObject([{ kind: 'wait-cut', secondsLeft: 120, stepId: REST }, { kind: 'step-done', stepId: REST }])
    expect(stand(resting, 16).asked).toBeNull()
  })

  it('does not ask for a piece that was set aside', () => {
    expect(stand([...laying([[1, 2, 3, 4, 5], 3]), event(9, { v: 1, kind: 'piece-set-aside', piece: 6, reason: 'dropped' })], 10).asked).toBeNull()
  })
})
