import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { RunAct, RunEvent } from '#shared/bench/run-event'
import { partsOf } from '#shared/bench/run-parts'
import { passesOn, piecesGoingOn, refusalOf, type RunState, runState } from '#shared/bench/run-state'
import { event, id, PERCH, planOf } from './finish'

const plan = planOf(PERCH, 6)
const stepIds = plan.steps.map(step => step.id)
const anyStep = fc.constantFrom(...stepIds)
const anyPieces = fc.uniqueArray(fc.integer({ min: 1, max: 6 }), { minLength: 1, maxLength: 6 })

/** Acts that add up: none of them replaces another. */
const anyAdditive: fc.Arbitrary<RunAct> = fc.oneof(
  fc.record({ v: fc.constant(1 as const), kind: fc.constant('pass-laid' as const), coatId: fc.constantFrom(id('coat', 1), id('coat', 2)), pieces: anyPieces, passes: fc.integer({ min: 1, max: 3 }) }),
  fc.record({ v: fc.constant(1 as const), kind: fc.constant('step-done' as const), stepId: anyStep, pieces: fc.option(anyPieces, { nil: undefined }), starts: fc.option(anyStep, { nil: undefined }) }),
  fc.record({ v: fc.constant(1 as const), kind: fc.constant('wait-started' as const), stepId: anyStep, pieces: fc.option(anyPieces, { nil: undefined }) }),
  fc.record({ v: fc.constant(1 as const), kind: fc.constant('deviation' as const), stepId: anyStep, what: fc.constant('wait' as const), note: fc.constant('longer') }),
)
const anyAct: fc.Arbitrary<RunAct> = fc.oneof(
  { arbitrary: anyAdditive, weight: 3 },
  { arbitrary: fc.record({ v: fc.constant(1 as const), kind: fc.constant('piece-set-aside' as const), piece: fc.integer({ min: 1, max: 6 }), reason: fc.constant('dropped') }), weight: 1 },
  { arbitrary: fc.record({ v: fc.constant(1 as const), kind: fc.constant('piece-taken-up' as const), piece: fc.integer({ min: 1, max: 6 }) }), weight: 1 },
  { arbitrary: fc.record({ v: fc.constant(1 as const), kind: fc.constant('inspected' as const), pieces: anyPieces, passed: fc.boolean(), note: fc.constant('') }), weight: 1 },
  { arbitrary: fc.constant({ v: 1 as const, kind: 'run-finished' as const }), weight: 1 },
)
const eventsOf = (acts: readonly RunAct[]) => acts.map((act, n) => event(n + 1, act))

/** A state as plain data, so that two can be compared. */
function plain(state: RunState): unknown {
  const sorted = (pieces: ReadonlySet<number> | 'all') => pieces === 'all' ? pieces : [...pieces].sort((a, b) => a - b)
  return {
    ...state,
    done: Object.fromEntries([...state.done].map(([step, { pieces, at }]) => [step, { pieces: sorted(pieces), at }])),
    laid: Object.fromEntries([...state.laid].map(([coat, pieces]) => [coat, Object.fromEntries(pieces)])),
    aside: Object.fromEntries(state.aside),
    inspected: Object.fromEntries(state.inspected),
  }
}

const shuffled = (acts: fc.Arbitrary<RunAct>) => fc.array(acts, { maxLength: 25 }).map(eventsOf)
  .chain(events => fc.tuple(fc.constant(events), fc.shuffledSubarray(events, { minLength: events.length })))

describe('where a run stands', () => {
  it('does not depend on the order in which acts that add up arrive', () => {
    fc.assert(fc.property(shuffled(anyAdditive), ([one, other]) => {
      expect(plain(runState(other))).toEqual(plain(runState(one)))
    }))
  })

  it('counts an act that arrives twice once', () => {
    fc.assert(fc.property(fc.array(anyAct, { maxLength: 20 }).map(eventsOf), fc.array(fc.nat(19)), (events, again) => {
      const twice = [...events, ...again.flatMap(n => events[n] ?? [])]
      expect(plain(runState(twice))).toEqual(plain(runState(events)))
    }))
  })

  it('is what it was before once an act is taken back, whatever was done meanwhile and however often it is taken back', () => {
    fc.assert(fc.property(fc.array(anyAct, { minLength: 1, maxLength: 20 }).map(eventsOf), fc.nat(), fc.integer({ min: 1, max: 3 }), (events, pick, times) => {
      const gone = events[pick % events.length]!
      const back: RunEvent[] = Array.from({ length: times }, (_, k) => event(100 + k, { v: 1, kind: 'taken-back', eventId: gone.id }))
      const without = events.filter(each => each !== gone)
      expect(plain(runState([...events, ...back]))).toEqual(plain(runState(without)))
      // A tablet that hears of the take-back first comes to the same.
      expect(plain(runState([...back, ...events]))).toEqual(plain(runState(without)))
    }))
  })

  it('adds up passes of two tablets that lay the same coat', () => {
    const lay = (n: number, pieces: number[]) => event(n, { v: 1, kind: 'pass-laid', coatId: id('coat', 1), pieces, passes: 1 })
    const state = runState([lay(1, [1, 2]), lay(2, [2, 3]), lay(3, [2])])
    expect([1, 2, 3, 4].map(piece => passesOn(id('coat', 1), piece, state))).toEqual([1, 3, 1, 0])
  })

  it('says why a piece was set aside, until it is taken up', () => {
    const aside = event(1, { v: 1, kind: 'piece-set-aside', piece: 4, reason: 'ran at the tail' })
    const up = event(2, { v: 1, kind: 'piece-taken-up', piece: 4 })
    expect(runState([aside]).aside.get(4)).toBe('ran at the tail')
    expect(piecesGoingOn(plan, runState([aside]))).toEqual([1, 2, 3, 5, 6])
    expect(piecesGoingOn(plan, runState([aside, up]))).toHaveLength(6)
  })
})

describe('a piece set aside', () => {
  it('holds up nothing, and comes back where it was left', () => {
    const aside = event(1, { v: 1, kind: 'piece-set-aside', piece: 4, reason: 'dropped' })
    const others = event(2, { v: 1, kind: 'step-done', stepId: 'prepare', pieces: [1, 2, 3, 5, 6] })
    expect(partsOf(plan, runState([aside, others])).map(part => [part.step?.id, part.pieces])).toEqual([[`mix:${id('coat', 1)}`, [1, 2, 3, 5, 6]]])
    const up = event(3, { v: 1, kind: 'piece-taken-up', piece: 4 })
    expect(partsOf(plan, runState([aside, others, up])).map(part => [part.step?.id, part.pieces])).toEqual([['prepare', [4]], [`mix:${id('coat', 1)}`, [1, 2, 3, 5, 6]]])
  })
})

describe('an act that cannot be of this run', () => {
  it.each<[string, RunAct]>([
    ['such coat', { v: 1, kind: 'pass-laid', coatId: id('coat', 77), pieces: [1], passes: 1 }],
    ['6 pieces', { v: 1, kind: 'pass-laid', coatId: id('coat', 1), pieces: [1, 7], passes: 1 }],
    ['such step', { v: 1, kind: 'step-done', stepId: 'lay:nothing' }],
    ['such step', { v: 1, kind: 'step-done', stepId: 'prepare', starts: 'rest:nothing' }],
    ['6 pieces', { v: 1, kind: 'piece-set-aside', piece: 7, reason: 'dropped' }],
  ])('is refused with its reason: %s', (reason, act) => {
    expect(refusalOf(plan, act)).toContain(reason)
  })

  it('is not one that merely comes late or early', () => {
    fc.assert(fc.property(anyAct, act => refusalOf(plan, act) === null))
  })
})
