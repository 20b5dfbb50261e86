import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { benchOrder, stepByStep } from '#shared/bench/bench-order'
import { workNow } from '#shared/bench/work-now'
import { goingOn } from '~/bench/going-on'
import { runSteps } from '#shared/bench/run-steps'
import { isFor } from '#shared/bench/run-step'
import { type RunPlan, runState } from '#shared/bench/run-state'
import { anyBody } from '../scheme/bodies'
import type { RunAct, RunEvent } from '#shared/bench/run-event'
import { waitLeft } from '#shared/bench/run-parts'
import { at, coatOf, EPOXY, event, finish, paint, PERCH } from './finish'

const planFor = (look: typeof PERCH, pieces: number): RunPlan => ({ steps: runSteps(look, pieces), pieces })
const anyPlan = fc.tuple(anyBody, fc.integer({ min: 1, max: 14 })).map(([body, pieces]) => planFor({ ...PERCH, body }, pieces))

describe('while every piece rests', () => {
  const plan = planFor(finish([coatOf(1, paint(1), { passes: 1, rest: 30 }), coatOf(2, paint(2), { passes: 1, rest: 5 })]), 2)
  const idOf = (kind: string, number: number) => plan.steps.find(step => step.kind === kind && 'number' in step && step.number === number)!.id
  const upTo = (id: string) => plan.steps.slice(0, plan.steps.findIndex(step => step.id === id) + 1)
  const doneTo = (id: string, more: string[] = []) => runState([...upTo(id).map(step => step.id), ...more].map((stepId, n) => event(n + 1, {
    v: 1, kind: 'step-done', stepId, ...stepId === idOf('lay', 1) ? { starts: idOf('rest', 1) } : {},
  }, 0)))
  const soon = Date.parse(at(10))
  const [laid, cleaned] = [idOf('lay', 1), idOf('clean', 1)]

  it('there is the airbrush to clean out, then the next cup to mix, and only the rest to wait for once that is done', () => {
    expect(workNow(plan, doneTo(laid), soon)).toMatchObject({ step: { id: cleaned }, pieces: [1, 2], isAhead: true })
    expect(workNow(plan, doneTo(laid, [cleaned]), soon)?.step?.id).toBe(idOf('mix', 2))
    expect(workNow(plan, doneTo(laid, [cleaned, idOf('mix', 2), idOf('test', 2)]), soon)?.step?.id).toBe(idOf('rest', 1))
  })

  it('what is done ahead begins no rest, and is done for all', () => {
    const ahead = workNow(plan, doneTo(laid), soon)!
    expect(goingOn(plan, doneTo(laid), ahead, ahead.pieces, soon)).toEqual([{ v: 1, kind: 'step-done', stepId: cleaned }])
  })

  it('goes on from the rest as soon as it is over, once the cup is ready', () => {
    const ready = doneTo(laid, [cleaned, idOf('mix', 2), idOf('test', 2)])
    expect(workNow(plan, ready, Date.parse(at(31)))).toMatchObject({ step: { id: idOf('rest', 1) }, pieces: [1, 2] })
  })

  it('mixes nothing that would set before the pieces are there, and no cup hours ahead', () => {
    const clear = planFor(finish([coatOf(1, paint(1), { passes: 1, rest: 20 }), coatOf(2, EPOXY, { passes: 1, rest: 5, tool: { kind: 'brush' } })]), 2)
    const { doings } = benchOrder(clear)
    const mixed = doings.find(doing => doing.step.kind === 'mix' && doing.step.number === 2)!
    const lastLaid = doings.findLast(doing => doing.step.kind === 'lay' && doing.step.number === 1)!
    expect(mixed.from).toBeGreaterThanOrEqual(lastLaid.to + 20)

    const slow = planFor(finish([coatOf(1, paint(1), { passes: 1, rest: 600 }), coatOf(2, paint(2), { passes: 1, rest: 5 })]), 2)
    const [mix, lay] = ['mix', 'lay'].map(kind => benchOrder(slow).doings.find(doing => doing.step.kind === kind && 'number' in doing.step && doing.step.number === 2)!)
    expect(lay!.from - mix!.from).toBeLessThanOrEqual(30 + 1e-9)
    expect(lay!.from).toBeGreaterThan(600)
  })
})

describe('a run worked in that order', () => {
  it('comes to its end whatever the finish', () => {
    fc.assert(fc.property(anyPlan, (plan) => {
      const events: RunEvent[] = []
      let [now, n] = [Date.parse(at(0)), 0]
      const act = (acts: readonly RunAct[]) => events.push(...acts.map(each => ({ ...event(++n, each, 0), doneAt: new Date(now).toISOString(), place: n })))
      for (let turn = 0; turn < plan.steps.length * plan.pieces * 2 + 10; turn++) {
        const state = runState(events)
        const part = workNow(plan, state, now)
        if (!part) return
        const left = Math.max(...part.pieces.map(piece => waitLeft(part.step!, piece, state, now)))
        if (left > 0 && part.step?.kind === 'heat') act([{ v: 1, kind: 'wait-started', stepId: part.step.id, pieces: part.pieces }])
        now += left
        if (part.step?.kind === 'lay') act([{ v: 1, kind: 'pass-laid', coatId: part.step.coat.id, pieces: part.pieces, passes: part.step.coat.passes }])
        act(goingOn(plan, runState(events), part, part.pieces, now))
      }
      throw new Error('It never came to an end')
    }), { numRuns: 60 })
  })
})

describe('the order of work at the bench', () => {
  it('wastes no more waiting, and ends no later, than each step on all pieces', () => {
    fc.assert(fc.property(anyPlan, (plan) => {
      const [order, naive] = [benchOrder(plan), stepByStep(plan)]
      expect(order.end).toBeLessThanOrEqual(naive.end + 1e-9)
      expect(order.idle).toBeLessThanOrEqual(naive.idle + 1e-9)
    }), { numRuns: 120 })
  })

  it('does everything once, each piece in the order of its steps, with no rest cut short and one thing at a time', () => {
    fc.assert(fc.property(anyPlan, (plan) => {
      const { doings } = benchOrder(plan)
      const wanted = stepByStep(plan).doings
      const name = (doing: (typeof doings)[number]) => `${doing.step.id} ${doing.piece}`
      expect(doings.map(name).sort()).toEqual(wanted.map(name).sort())
      doings.slice(1).forEach((doing, i) => expect(doing.from).toBeGreaterThanOrEqual(doings[i]!.to - 1e-9))
      for (let piece = 1; piece <= plan.pieces; piece++) {
        let free = 0
        for (const step of plan.steps.filter(each => isFor(each, piece))) {
          const own = doings.find(doing => doing.step === step && doing.piece === piece)
          if (own) {
            expect(own.from).toBeGreaterThanOrEqual(free - 1e-9)
            free = own.to
          }
          else if (step.kind === 'rest' || step.kind === 'turn' || step.kind === 'cure') free += step.minutes
        }
      }
    }), { numRuns: 80 })
  })

  it('lays no coat before its cup is mixed, and empties none before every piece has had its coats', () => {
    fc.assert(fc.property(anyPlan, (plan) => {
      const { doings } = benchOrder(plan)
      const place = (id: string) => doings.findIndex(doing => doing.step.id === id)
      for (const step of plan.steps) {
        if (step.kind === 'mix') expect(place(step.id)).toBeLessThan(place(plan.steps.find(each => each.kind === 'lay' && each.coat.id === step.coat.id && each.only?.[0] === step.only?.[0])!.id))
        if (step.kind === 'clean') expect(doings.findLastIndex(doing => doing.step.kind === 'lay' && doing.step.coat.id === step.coat.id)).toBeLessThan(place(step.id))
      }
    }), { numRuns: 80 })
  })

  it('takes max(N·t, t + F) for a coat: twelve pieces of ¾ min with a rest of 8 min do not wait, six do', () => {
    // Cycle a coat, as the trade reckons: batch of 12, t 0.75, F 8 → 9.0 min.
    const cycle = (pieces: number) => {
      const coats = [1, 2].map(n => coatOf(n, paint(1), { passes: 1, rest: 8 }))
      const { doings } = benchOrder(planFor(finish(coats), pieces))
      const [first, second] = coats.map(coat => doings.find(doing => doing.step.kind === 'lay' && doing.step.coat.id === coat.id)!.from)
      return second! - first!
    }
    expect(cycle(12)).toBeCloseTo(9, 9)
    expect(cycle(6)).toBeCloseTo(0.75 + 8, 9)
  })

  it('cleans out and mixes the next colour while pieces rest', () => {
    const plan = planFor(finish([coatOf(1, paint(1), { passes: 1, rest: 30 }), coatOf(2, paint(2), { passes: 1, rest: 5 })]), 3)
    const order = benchOrder(plan)
    const at = (kind: string, number: number) => order.doings.find(doing => doing.step.kind === kind && 'number' in doing.step && doing.step.number === number)!
    for (const ahead of [at('clean', 1), at('mix', 2)]) expect(ahead.to).toBeLessThan(at('lay', 2).from)
    expect(order.idle).toBeLessThan(stepByStep(plan).idle)
  })
})
