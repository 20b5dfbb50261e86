import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { labFromPatch } from '#shared/bench/grey-card'
import { differenceWords } from '#shared/bench/difference-words'
import { EFFECT_IS_NOT_JUDGED, judgeZones } from '#shared/bench/judge-zones'
import { paintUsed } from '#shared/bench/paint-used'
import { patchMean } from '#shared/bench/patch-mean'
import { runDifferences, takeInEdits } from '#shared/bench/run-differences'
import type { RunAct } from '#shared/bench/run-event'
import type { ZoneMeasure } from '#shared/bench/run-measure'
import { runState } from '#shared/bench/run-state'
import { benchMinutes, stepTimes } from '#shared/bench/step-times'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { amounts, PLANNING_VALUES } from '#shared/scheme/amounts'
import { areaCells } from '#shared/scheme/coat-area'
import { applyEdit } from '#shared/scheme/edits'
import { coatOf, event, finish, id, paint, PERCH, planOf } from './finish'

const plan = planOf(PERCH, 4)
const ALL = [1, 2, 3, 4]
const [COAT, PEARL_COAT] = [id('coat', 1), id('coat', 2)]
const lay = (coatId: string, pieces: number[], passes: number): RunAct => ({ v: 1, kind: 'pass-laid', coatId, pieces, passes })
const done = (stepId: string, pieces?: number[]): RunAct => ({ v: 1, kind: 'step-done', stepId, pieces })
const differences = (...acts: RunAct[]) => runDifferences(plan, runState(acts.map((act, n) => event(n + 1, act))))

describe('what the bench did otherwise', () => {
  it('is what most good pieces had: one that ran counts for nothing', () => {
    expect(differences(lay(COAT, ALL, 3), done(`lay:${COAT}`))).toEqual([])
    expect(differences(lay(COAT, ALL, 3), lay(COAT, [1, 2, 3], 1), done(`lay:${COAT}`))).toMatchObject([{ what: 'passes', planned: 3, done: 4 }])
    expect(differences(lay(COAT, ALL, 3), lay(COAT, [4], 2), { v: 1, kind: 'piece-set-aside', piece: 4, reason: 'ran' }, done(`lay:${COAT}`, [1, 2, 3]))).toEqual([])
  })

  it('says nothing of a coat that most pieces have not had yet', () => {
    expect(differences(lay(COAT, [1, 2], 2), done(`lay:${COAT}`, [1, 2]))).toEqual([])
  })

  it('is another thinning, another paint, a wait set or cut short, and none of them once taken back', () => {
    const acts: RunAct[] = [
      lay(PEARL_COAT, ALL, 2), done(`lay:${PEARL_COAT}`), { v: 1, kind: 'thinned', coatId: PEARL_COAT, reducer: 9 },
      { v: 1, kind: 'paint-changed', coatId: PEARL_COAT, from: paint(8).id, to: paint(2).id }, { v: 1, kind: 'wait-set', stepId: `rest:${PEARL_COAT}`, seconds: 600 },
      { v: 1, kind: 'wait-cut', stepId: `rest:${PEARL_COAT}`, secondsLeft: 60 },
    ]
    const found = differences(...acts)
    expect(found).toEqual([
      { what: 'thinning', coatId: PEARL_COAT, number: 2, planned: 5, done: 9 },
      { what: 'paint', coatId: PEARL_COAT, number: 2, from: paint(8).id, to: paint(2).id },
      { what: 'wait', coatId: PEARL_COAT, number: 2, kind: 'rest', planned: 300, done: 540 },
    ])
    expect(found.map(each => differenceWords(each, paintId => paintId === paint(2).id ? 'Bone' : 'Pearl'))).toEqual([
      'Coat 2: 9 drops of reducer, not 5', 'Coat 2: Bone in place of Pearl', 'Coat 2: rest 9 minutes, not 5 minutes',
    ])
    const back = acts.map((_, n): RunAct => ({ v: 1, kind: 'taken-back', eventId: event(n + 1, acts[n]!).id })).slice(2)
    expect(differences(...acts, ...back)).toEqual([])
  })

  it('taken into the scheme is what the bench then no longer does otherwise', () => {
    const anyDone = fc.record({ passes: fc.integer({ min: 1, max: 6 }), reducer: fc.integer({ min: 0, max: 20 }), seconds: fc.integer({ min: 1, max: 60 }).map(n => n * 6) })
    fc.assert(fc.property(anyDone, ({ passes, reducer, seconds }) => {
      const acts = [lay(COAT, ALL, passes), done(`lay:${COAT}`), { v: 1 as const, kind: 'thinned' as const, coatId: COAT, reducer }, { v: 1 as const, kind: 'wait-set' as const, stepId: `rest:${COAT}`, seconds }]
      const state = runState(acts.map((act, n) => event(n + 1, act)))
      const body = takeInEdits(runDifferences(plan, state), PERCH).reduce((now, edit) => {
        const outcome = applyEdit(now, edit)
        return outcome.ok ? outcome.body : expect.fail(outcome.because)
      }, PERCH.body)
      expect(runDifferences(planOf({ ...PERCH, body }, 4), state)).toEqual([])
    }))
  })
})

describe('paint taken from the shelf', () => {
  const cells = areaCells(prepareBlank(PERCH.materials.blank.shape))
  const used = (acts: readonly RunAct[], look = PERCH, start = {}) => paintUsed(look, cells, planOf(look, 4), acts.map((act, n) => ({ ...event(n + 1, act), place: n + 1 })), start)

  it('comes to what the amounts plan, when everything is done as planned', () => {
    const acts = plan.steps.flatMap(step => step.kind === 'lay' ? [lay(step.coat.id, ALL, step.coat.passes)] : step.kind === 'mix' ? [done(step.id)] : [])
    const planned = new Map<string, number>()
    for (const { paints } of amounts(PERCH.body, PERCH.materials, cells, { pieces: 4, ...PLANNING_VALUES })) for (const { paintId, ml } of paints) planned.set(paintId, (planned.get(paintId) ?? 0) + ml)
    expect(used(acts)).toHaveLength(planned.size)
    for (const { paintId, ml } of used(acts)) expect(ml).toBeCloseTo(planned.get(paintId)!, 9)
  })

  it('is less of a thinner cup, and of the paint that stands in', () => {
    const [usual] = used([lay(COAT, [1], 1)])
    const [thin] = used([{ v: 1, kind: 'thinned', coatId: COAT, reducer: 30 }, lay(COAT, [1], 1)])
    expect(thin!.ml).toBeLessThan(usual!.ml * 0.8)
    expect(used([{ v: 1, kind: 'paint-changed', coatId: COAT, from: paint(1).id, to: paint(2).id, pieces: [1] }, lay(COAT, [1, 2], 1)]).map(each => each.paintId)).toEqual([paint(1).id, paint(2).id])
  })

  it('comes out of the bottle that was at hand when it was laid, whatever order acts arrive in', () => {
    const bottle = (n: number) => `ffffffff-0000-4000-8000-00000000000${n}`
    const acts: RunAct[] = [lay(COAT, [1], 1), { v: 1, kind: 'bottle-used', paintId: paint(1).id, bottleId: bottle(2) }, lay(COAT, [2, 3], 1)]
    const events = acts.map((act, n) => ({ ...event(n + 1, act), place: n + 1 }))
    const by = (order: typeof events) => paintUsed(PERCH, cells, plan, order, { [paint(1).id]: bottle(1) }).map(({ bottleId, ml }) => [bottleId, ml])
    const [[first, one], [second, two]] = by(events) as [[string, number], [string, number]]
    expect([first, second]).toEqual([bottle(1), bottle(2)])
    expect(two).toBeCloseTo(2 * one, 12)
    expect(by([...events].reverse())).toEqual(by(events))
  })

  it('of two coats from one cup has the loss of the cup once', () => {
    const look = finish([coatOf(1, paint(1)), coatOf(2, paint(1))])
    const steps = planOf(look, 4).steps.filter(step => step.kind === 'mix')
    expect(steps).toHaveLength(1)
    const [loss] = used([done(steps[0]!.id), done(steps[0]!.id, [1])], look)
    expect(loss!.ml).toBeCloseTo(PLANNING_VALUES.cupLoss / (1 + 5 / 20), 9)
  })
})

describe('times of a run', () => {
  it('count a long pause as a quarter of an hour, and no act twice', () => {
    const acts = [event(1, done('prepare'), 0), event(2, lay(COAT, [1], 1), 5), event(3, lay(COAT, [2], 1), 245)]
    expect(benchMinutes(acts)).toBe(20)
    expect(benchMinutes([...acts, ...acts])).toBe(20)
    expect(benchMinutes([])).toBe(0)
  })

  it('say for each step when it was done, by whom, and how long a piece stood at it', () => {
    const by = (name: string, each: ReturnType<typeof event>) => ({ ...each, by: { name } })
    const times = stepTimes(plan, [
      by('Ada', event(1, done('prepare'), 10)),
      by('Ada', event(2, done(`mix:${COAT}`), 14)),
      by('Ada', event(3, done(`lay:${COAT}`, [1, 2]), 20)),
      by('Bo', event(4, done(`lay:${COAT}`, [3, 4]), 26)),
    ], event(0, done('prepare'), 0).doneAt)
    expect(times.map(({ step, minutes, pieces, by: names }) => [step.kind, minutes, pieces, names])).toEqual([
      ['prepare', 10, 4, ['Ada']], ['mix', 4, 4, ['Ada']], ['lay', 6, 4, ['Ada', 'Bo']],
    ])
  })
})

describe('a colour out of a photo', () => {
  it('is neutral and of L* 49.5 where it is the card, whatever the lamp', () => {
    const code = fc.integer({ min: 60, max: 220 })
    fc.assert(fc.property(code, code, code, (r, g, b) => {
      const [L, a, bb] = labFromPatch([r, g, b], [r, g, b])
      expect(L).toBeCloseTo(49.5, 1)
      expect(Math.hypot(a, bb)).toBeLessThan(0.1)
    }))
  })

  it('does not change when lamp and exposure change card and piece alike', () => {
    const dim = (code: number, by: number) => 255 * ((code / 255) ** 2.2 * by) ** (1 / 2.2)
    const plain = labFromPatch([180, 90, 60], [118, 118, 118])
    const warm = labFromPatch([dim(180, 0.9), dim(90, 0.75), dim(60, 0.6)], [dim(118, 0.9), dim(118, 0.75), dim(118, 0.6)])
    expect(Math.hypot(...plain.map((value, n) => value - warm[n]!))).toBeLessThan(1.5)
  })

  it('is refused where the card is black or burnt out', () => {
    expect(() => labFromPatch([90, 90, 90], [255, 250, 240])).toThrow(RangeError)
    expect(() => labFromPatch([90, 90, 90], [10, 12, 9])).toThrow(RangeError)
  })

  it('is held against promise and sample, and not judged where paint depends on the angle', () => {
    const zone = (more: Partial<ZoneMeasure>): ZoneMeasure => ({ zone: 'back', label: 'Back', measured: [50, 0, 0], predicted: [51, 0, 0], isEffect: false, ...more })
    expect(judgeZones([zone({})], [])).toMatchObject([{ sample: null, toSample: null, words: 'barely seen' }])
    expect(judgeZones([zone({})], [zone({ measured: [60, 20, 0] })])).toMatchObject([{ sample: [60, 20, 0], words: 'another colour' }])
    expect(judgeZones([zone({ isEffect: true })], [])).toMatchObject([{ words: EFFECT_IS_NOT_JUDGED }])
    expect(judgeZones([zone({ predicted: null })], [])).toMatchObject([{ toPredicted: null, words: 'nothing to hold it against' }])
  })
})

describe('a patch of a photo', () => {
  const photo = (paint: (x: number, y: number) => number) => {
    const data = new Uint8ClampedArray(20 * 10 * 4)
    for (let y = 0; y < 10; y++) for (let x = 0; x < 20; x++) data.fill(paint(x, y), 4 * (20 * y + x), 4 * (20 * y + x) + 3)
    return { data, width: 20, height: 10 }
  }

  it('is the mean of its light, without what lies beside it or outside the photo', () => {
    expect(patchMean(photo(() => 118), 10, 5, 3).map(Math.round)).toEqual([118, 118, 118])
    expect(Math.round(patchMean(photo(x => x < 10 ? 20 : 200), 3, 5, 3)[0])).toBe(20)
    expect(Math.round(patchMean(photo(() => 90), 0, 0, 4)[0])).toBe(90)
    // Half black, half white sends back half the light, which a screen shows as 188.
    expect(Math.round(patchMean(photo((x, y) => (x + y) % 2 === 0 ? 0 : 255), 9.5, 4.5, 4)[0])).toBe(188)
    expect(() => patchMean(photo(() => 90), 50, 50, 4)).toThrow(RangeError)
  })
})
