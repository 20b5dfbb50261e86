import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { piecesPerMix } from '#shared/bench/mix-batches'
import type { RunStep } from '#shared/bench/run-step'
import { runSteps } from '#shared/bench/run-steps'
import { cupAmount } from '#shared/bench/cup-amount'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { areaCells } from '#shared/scheme/coat-area'
import { anyBody } from '../scheme/bodies'
import { coatOf, EPOXY, finish, id, paint, PEARL, PERCH, SOLVENT } from './finish'

const short = (steps: readonly RunStep[]) => steps.map(step => 'number' in step ? `${step.kind} ${step.number}` : step.kind)
const only = <K extends RunStep['kind']>(steps: readonly RunStep[], kind: K) => steps.filter((step): step is Extract<RunStep, { kind: K }> => step.kind === kind)

describe('the steps of a finish', () => {
  it('follow the stack from the ground to the turner', () => {
    expect(short(runSteps(PERCH, 6))).toEqual([
      'prepare', 'warm',
      'mix 1', 'set 1', 'test 1', 'lay 1', 'rest 1', 'clean 1',
      'mix 2', 'fit', 'test 2', 'lay 2', 'rest 2', 'clean 2', 'lift',
      'mix 3', 'test 3', 'lay 3', 'rest 3', 'heat 3', 'clean 3',
      'eyes', 'look-over', 'mix 4', 'lay 4', 'turn 4', 'cure 4',
      'inspect',
    ])
  })

  it('are those of the day a run began: one of before is not sent back to what was added since', () => {
    const old = runSteps(PERCH, 6, { form: 1, madeOf: null })
    expect(short(old)).toEqual([
      'prepare',
      'mix 1', 'lay 1', 'rest 1', 'clean 1',
      'fit', 'mix 2', 'lay 2', 'rest 2', 'clean 2', 'lift',
      'mix 3', 'lay 3', 'rest 3', 'heat 3', 'clean 3',
      'eyes', 'mix 4', 'lay 4', 'turn 4',
      'inspect',
    ])
    const ids = new Set(runSteps(PERCH, 6).map(step => step.id))
    expect(old.filter(step => !ids.has(step.id))).toEqual([])
  })

  it('set the airbrush anew where nozzle, pressure or distance change, and test it then', () => {
    const fine = { kind: 'airbrush', nozzle: 0.2, pressure: 0.7, distance: 3 } as const
    const steps = runSteps(finish([coatOf(1, paint(1)), coatOf(2, paint(1), { tool: fine }), coatOf(3, paint(2), { tool: fine })]), 2)
    expect(short(steps).filter(word => /^(?:mix|set|test)/.test(word))).toEqual(['mix 1', 'set 1', 'test 1', 'set 2', 'test 2', 'mix 3', 'test 3'])
    expect(only(steps, 'set').map(step => step.tool.pressure)).toEqual([1.5, 0.7])
  })

  it('say how warm a body may get, where it is known what it is made of', () => {
    const limit = (madeOf: 'foam' | null) => only(runSteps(PERCH, 2, { form: 2, madeOf }), 'heat')[0]?.limit
    expect([limit('foam'), limit(null)]).toEqual([43, null])
  })

  it('are the same, with the same names, on every tablet', () => {
    expect(runSteps(structuredClone(PERCH), 40)).toEqual(runSteps(PERCH, 40))
  })

  it('have every act of any stack once and in its order, each under a name of its own', () => {
    fc.assert(fc.property(anyBody, fc.integer({ min: 1, max: 30 }), (body, pieces) => {
      const steps = runSteps({ ...PERCH, body }, pieces)
      const acts = steps.flatMap(step => step.kind === 'lay' ? [step.coat.id] : step.kind === 'fit' || step.kind === 'lift' ? [`${step.kind} ${step.mask.id}`] : [])
      expect(acts).toEqual(body.stack.map(item => item.act === 'coat' ? item.coat.id : `${item.act} ${item.maskId}`))
      expect(new Set(steps.map(step => step.id)).size).toBe(steps.length)
      expect([steps[0]?.kind, steps.at(-1)?.kind]).toEqual(['prepare', 'inspect'])
    }))
  })

  it('say through which masks a coat is laid', () => {
    expect(only(runSteps(PERCH, 6), 'lay').map(step => step.through.map(mask => mask.name))).toEqual([[], ['Mask 1'], [], []])
  })

  it('clean out when the cup changes, and mix once for coats from one cup', () => {
    const same = finish([coatOf(1, paint(1)), coatOf(2, paint(1)), coatOf(3, paint(2))])
    expect(short(runSteps(same, 4)).filter(word => !/^(?:rest|warm|set|test|cure)/.test(word))).toEqual(['prepare', 'mix 1', 'lay 1', 'lay 2', 'clean 2', 'mix 3', 'lay 3', 'clean 3', 'inspect'])
    expect(only(runSteps(same, 4), 'mix').map(step => step.coats.length)).toEqual([2, 1])
    expect(only(runSteps(same, 4), 'clean').map(step => step.next)).toEqual(['Coat 3', null])
  })

  it('clean out between other drops of the same paint', () => {
    const thinner = finish([coatOf(1, paint(1)), coatOf(2, paint(1), { mix: { parts: [{ paintId: paint(1).id, drops: 20 }], reducer: 12 } })])
    expect(short(runSteps(thinner, 1))).toContain('clean 1')
  })

  it('set the eyes before the first clear, at the end without one, never without eyes', () => {
    expect(short(runSteps(finish([coatOf(1, paint(1))], { eyes: true }), 1)).slice(-3)).toEqual(['eyes', 'cure 1', 'inspect'])
    expect(short(runSteps(finish([coatOf(1, paint(1)), coatOf(4, EPOXY)]), 1))).not.toContain('eyes')
  })
})

describe('a clear that sets in its cup', () => {
  it('is mixed as often as the pot life asks, each time for pieces that follow one another', () => {
    // 30 minutes of pot life, two thirds of it used, 2 minutes a piece: ten pieces a mix.
    expect(piecesPerMix(30, 1)).toBe(10)
    const clear = runSteps(PERCH, 24).filter(step => step.id.includes(id('coat', 4)))
    expect(clear.map(step => [step.kind, step.only])).toEqual([
      ['mix', [1, 8]], ['lay', [1, 8]], ['mix', [9, 16]], ['lay', [9, 16]], ['mix', [17, 24]], ['lay', [17, 24]], ['turn', null], ['cure', null],
    ])
  })

  it('covers every piece once, with no mix larger than its time', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 200 }), fc.integer({ min: 1, max: 90 }), (pieces, potLifeMinutes) => {
      const quick = { ...EPOXY, potLifeMinutes }
      const look = { ...PERCH, materials: { ...PERCH.materials, paints: [quick] }, body: finish([coatOf(4, EPOXY)]).body }
      const covered = only(runSteps(look, pieces), 'lay').flatMap((step) => {
        const [first, last] = step.only ?? [1, pieces]
        expect(last - first + 1).toBeLessThanOrEqual(piecesPerMix(potLifeMinutes, step.coat.passes))
        return Array.from({ length: last - first + 1 }, (_, k) => first + k)
      })
      expect(covered).toEqual(Array.from({ length: pieces }, (_, k) => k + 1))
    }))
  })
})

describe('cautions', () => {
  const caution = (stepId: string) => runSteps(PERCH, 3).find(step => step.id.startsWith(stepId))?.caution

  it('stand at every step where the cup is open, for what is in it', () => {
    for (const step of runSteps(PERCH, 3)) if (step.kind === 'mix' || step.kind === 'lay' || step.kind === 'clean') expect(step.caution, step.id).not.toBeNull()
    expect(caution(`mix:${id('coat', 4)}`)).toMatchObject({ headline: expect.stringContaining('nitrile') as string, statements: expect.arrayContaining(['H317 May cause an allergic skin reaction']) as string[] })
    expect(caution(`lay:${id('coat', 3)}`)).toMatchObject({ headline: expect.stringContaining('no flame') as string, pictograms: expect.arrayContaining(['GHS02']) as string[] })
  })

  it('speak of the gravest thing before anything is opened', () => {
    expect(caution('prepare')?.headline).toContain('Solvent')
  })

  it('go on while solvent or resin dries, and not for water', () => {
    expect(caution(`rest:${id('coat', 1)}`)).toBeNull()
    expect(caution(`rest:${id('coat', 3)}`)).not.toBeNull()
    expect(caution(`turn:${id('coat', 4)}`)).not.toBeNull()
  })

  it('stand at heat and at glue', () => {
    expect(caution('heat')?.headline).toContain('Heat')
    expect(caution('eyes')?.statements).toContain('H335 May cause respiratory irritation')
  })
})

describe('what goes into the cup', () => {
  const cells = areaCells(prepareBlank(PERCH.materials.blank.shape))
  const mixes = (look = PERCH, pieces = 6) => only(runSteps(look, pieces), 'mix')

  it('grows with the pieces and keeps the drops in their ratio', () => {
    const [step] = mixes()
    const six = cupAmount(step!, PERCH, cells, 6)!
    const twelve = cupAmount(step!, PERCH, cells, 12)!
    expect(twelve.ml).toBeGreaterThan(1.5 * six.ml)
    expect(twelve.ml).toBeLessThan(2 * six.ml)
    const [white, reducer] = six.parts
    expect(white!.ml / reducer!.ml).toBeCloseTo(20 / 5, 6)
    expect(six.parts.reduce((sum, part) => sum + part.ml, 0)).toBeCloseTo(six.ml, 6)
    expect(six.parts.reduce((sum, part) => sum + part.grams, 0)).toBeCloseTo(six.grams, 6)
    expect(white!.drops).toBe(Math.ceil(white!.ml * 20))
  })

  it('is enough for every coat from one cup, with the loss of the cup once', () => {
    const one = finish([coatOf(1, paint(1))])
    const two = finish([coatOf(1, paint(1)), coatOf(2, paint(1))])
    const first = cupAmount(mixes(one)[0]!, one, cells, 6)!
    const both = cupAmount(mixes(two)[0]!, two, cells, 6)!
    expect(both.ml).toBeCloseTo(2 * first.ml - 0.75, 6)
  })

  it('is strained for a nozzle, stirred for flakes, and stirred whole and kept shallow for epoxy', () => {
    const [white, pearl, solvent, epoxy] = mixes()
    expect([white!.advice, pearl!.advice, solvent!.advice]).toEqual([['strain'], ['strain', 'stir often'], ['strain']])
    expect(epoxy!.advice).toEqual(['stir both parts', 'shallow cup'])
    expect(PEARL.optics.kind).toBe('flake')
    expect(SOLVENT.base).toBe('solvent')
  })
})
