import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { body, coat, id, paint } from './bodies'
import { workedOut } from './worked-out'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { PLANNING_VALUES } from '#shared/quantities/planning-values'
import { UNIT_CHOICES, type UnitChoices, unitChoices, unitOf } from '#shared/quantities/quantities'
import { amounts, type CoatAmount } from '#shared/scheme/amounts'
import { costOf } from '#shared/scheme/amounts/cost'
import { liftOf, weightTogether } from '#shared/scheme/amounts/dry-film'
import type { Figure } from '#shared/scheme/amounts/figure'
import { mixesFor, potLifeAt } from '#shared/scheme/amounts/mixes'
import type { SchemeBody } from '#shared/scheme/body'
import { areaCells } from '#shared/scheme/coat-area'

const minnow = areaCells(prepareBlank(builtInBlank('minnow-90')))
const EPOXY = paint(2, {
  kind: 'clear', base: 'epoxy', volumeSolids: 100, filmPerPass: 150, reducerPer100: 0, potLifeMinutes: 25,
  twoPart: { by: 'volume', resin: 2, hardener: 1, resinDensity: 1.16, hardenerDensity: 1.02 },
})
const materials = { paints: [paint(1), EPOXY, paint(3, { volumeSolids: 30, density: 1.2 })] }
const cup = (parts: [paintNumber: number, drops: number][], reducer = 0) => ({ parts: parts.map(([n, drops]) => ({ paintId: id('paint', n), drops })), reducer })
const scheme: SchemeBody = { ...body(), stack: [
  { act: 'coat', coat: coat(1, { passes: 3, mix: cup([[1, 8], [3, 2]], 3) }) },
  { act: 'coat', coat: coat(2, { passes: 2, tool: { kind: 'brush' }, mix: cup([[2, 10]]) }) },
] }
const plan = { ...PLANNING_VALUES, pieces: 12 }
const prices = new Map([[id('paint', 1), 0.12], [id('paint', 2), 0.07], [id('paint', 3), 0.2]])

const figuresOf = ({ area, film, wet, mix, paint: bought, reducer, mass, dry, setting }: CoatAmount): Figure[] =>
  [area, film, wet, mix, bought, reducer, mass, dry, ...setting ? [setting.potLifeFigure] : []]

const anyChoices: fc.Arbitrary<UnitChoices> = fc.record({
  length: fc.constantFrom(...UNIT_CHOICES.length), volume: fc.constantFrom(...UNIT_CHOICES.volume), mass: fc.constantFrom(...UNIT_CHOICES.mass),
  pressure: fc.constant('bar' as const), temperature: fc.constantFrom(...UNIT_CHOICES.temperature),
})

describe('every figure', () => {
  it('can be worked out again from the formula and the inputs that are shown, in whatever units', () => {
    const coats = amounts(scheme, materials, minnow, plan)
    const cost = costOf(coats, plan.pieces, prices)
    const films = coats.map(({ area, film, dry }) => ({ area: area.value, film: film.value, weight: dry.value }))
    const figures = [...coats.flatMap(figuresOf), cost.perPiece, ...cost.byCoat.values(), liftOf(films)]
    fc.assert(fc.property(anyChoices, (choices) => {
      for (const figure of figures) {
        const shown = unitOf(figure.quantity, choices).fromKept(figure.value)
        expect(Math.abs(workedOut(figure, choices) - shown), figure.formula).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(shown)))
      }
    }))
  })

  it('grows with the pieces, but for what each cup keeps', () => {
    fc.assert(fc.property(fc.integer({ min: 1, max: 400 }), fc.integer({ min: 2, max: 5 }), (pieces, times) => {
      const laid = (n: number) => amounts(scheme, materials, minnow, { ...plan, pieces: n }).map(each => each.mix.value - each.cups.length * plan.cupLoss)
      const [once, more] = [laid(pieces), laid(pieces * times)]
      once.forEach((value, k) => expect(more[k]! / (value * times)).toBeCloseTo(1, 9))
    }))
  })
})

describe('mixes of what sets', () => {
  const anyGiven = fc.record({
    pieces: fc.integer({ min: 1, max: 500 }), potLifeMinutes: fc.double({ min: 1, max: 600, noNaN: true }), passes: fc.integer({ min: 1, max: 6 }),
    room: fc.double({ min: 5, max: 40, noNaN: true }), setsFaster: fc.double({ min: 1.5, max: 2.5, noNaN: true }),
    minutesPerPass: fc.double({ min: 0.2, max: 20, noNaN: true }), usable: fc.double({ min: 0.3, max: 1, noNaN: true }),
  })

  it('reach for every piece once, and none outlives its pot life', () => {
    fc.assert(fc.property(anyGiven, (given) => {
      const { batches, piecesPerMix, minutesPerPiece } = mixesFor(given)
      expect(batches.flatMap(([first, last]) => Array.from({ length: last - first + 1 }, (_, k) => first + k))).toEqual(Array.from({ length: given.pieces }, (_, k) => k + 1))
      const longest = Math.max(...batches.map(([first, last]) => last - first + 1))
      if (piecesPerMix === 0) expect(longest).toBe(1)
      else expect(longest * minutesPerPiece).toBeLessThanOrEqual(potLifeAt(given.potLifeMinutes, given.room, given.setsFaster) * given.usable * (1 + 1e-8))
    }), { numRuns: 500 })
  })

  it('are no more than are needed', () => {
    fc.assert(fc.property(anyGiven, (given) => {
      const { batches, piecesPerMix } = mixesFor(given)
      expect((batches.length - 1) * Math.max(1, piecesPerMix)).toBeLessThan(given.pieces)
    }))
  })

  it('of 25 min at 21 °C, two passes of 2 min, two thirds planned with, reach for 5 pieces; in a warm room for 3', () => {
    const given = { pieces: 12, potLifeMinutes: 25, passes: 2, room: 21, setsFaster: 2, minutesPerPass: 2, usable: 2 / 3 }
    expect(mixesFor(given)).toMatchObject({ piecesPerMix: 5, batches: [[1, 4], [5, 8], [9, 12]] })
    expect(mixesFor({ ...given, room: 28 }).piecesPerMix).toBe(3)
    expect(mixesFor({ ...given, minutesPerPass: 30 }).piecesPerMix).toBe(0)
  })

  it('add up to the whole, each with what its cup keeps, resin and hardener in their ratio', () => {
    const [, clear] = amounts(scheme, materials, minnow, plan) as [CoatAmount, CoatAmount]
    expect(clear.cups).toHaveLength(3)
    expect(clear.cups.reduce((sum, each) => sum + each.mix, 0)).toBeCloseTo(clear.mix.value, 9)
    for (const { mix, paints } of clear.cups) {
      const { volumes, weights } = paints[0]!.twoParts!
      expect(volumes!.resin + volumes!.hardener).toBeCloseTo(mix, 9)
      expect(volumes!.resin / volumes!.hardener).toBeCloseTo(2, 9)
      expect(weights!.hardener / weights!.resin).toBeCloseTo(0.5 * 1.02 / 1.16, 9)
    }
    expect(clear.mass.value).toBeCloseTo(clear.cups.reduce((sum, { paints }) => sum + paints[0]!.twoParts!.weights!.resin + paints[0]!.twoParts!.weights!.hardener, 0), 9)
  })

  it('of what does not set is one cup', () => {
    expect(amounts(scheme, materials, minnow, plan)[0]!.cups.map(({ first, last }) => [first, last])).toEqual([[1, 12]])
  })
})

describe('what is added to a lure', () => {
  const films = (coats: readonly CoatAmount[]) => coats.map(({ area, film, dry }) => ({ area: area.value, film: film.value, weight: dry.value }))

  it('weighs what its film does, whatever the number of pieces and the airbrush', () => {
    const at = (more: Partial<typeof plan>) => weightTogether(films(amounts(scheme, materials, minnow, { ...plan, ...more }))).value
    expect(at({ pieces: 100, transfer: { ...plan.transfer, airbrush: 0.15 } })).toBeCloseTo(at({}), 12)
    const clear = amounts(scheme, materials, minnow, plan)[1]!
    expect(clear.dry.value).toBeCloseTo(clear.area.value * 0.03 * (2 * 1.16 + 1.02) / 3, 9)
    expect(clear.isClear).toBe(true)
  })

  it('makes it float less: clear is denser than water, by 0.11 of what it weighs at 1.113 g/mL', () => {
    const clear = films(amounts(scheme, materials, minnow, plan).slice(1))
    expect(liftOf(clear).value / weightTogether(clear).value).toBeCloseTo(0.9991 / ((2 * 1.16 + 1.02) / 3) - 1, 4)
  })
})

describe('cost', () => {
  it('is paint by price, and says which paint has none', () => {
    const coats = amounts(scheme, materials, minnow, plan)
    const cost = costOf(coats, 12, new Map([[id('paint', 2), 0.07]]))
    expect(cost.total.value).toBeCloseTo(0.07 * coats[1]!.paint.value, 12)
    expect(cost.perPiece.value).toBeCloseTo(cost.total.value / 12, 12)
    expect(cost.unpriced).toEqual([id('paint', 1), id('paint', 3)])
    expect(costOf(coats, 12, new Map()).total.value).toBe(0)
  })

  it('is read the same in fluid ounces', () => {
    const figure = costOf(amounts(scheme, materials, minnow, plan), 12, prices).byCoat.get(id('coat', 1))!
    expect(workedOut(figure, unitChoices('inch'))).toBeCloseTo(figure.value, 9)
  })
})
