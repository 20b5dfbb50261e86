import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { MEASURED, QUANTITIES, UNIT_CHOICES, UNIT_SYSTEMS, type UnitChoices, unitChoices, unitOf } from '#shared/quantities/quantities'
import { readMeasure, readNumber } from '#shared/quantities/read-measure'
import { readable, toDigits, toKept, toShown } from '#shared/quantities/shown-figure'
import { OwnPlanning, planWith, PLANNING_VALUES, PlanningValues } from '#shared/quantities/planning-values'

const anyChoices: fc.Arbitrary<UnitChoices> = fc.record({
  length: fc.constantFrom(...UNIT_CHOICES.length), volume: fc.constantFrom(...UNIT_CHOICES.volume), mass: fc.constantFrom(...UNIT_CHOICES.mass),
  pressure: fc.constantFrom(...UNIT_CHOICES.pressure), temperature: fc.constantFrom(...UNIT_CHOICES.temperature),
})
const TYPED = ['length', 'volume', 'mass', 'pressure', 'temperature', 'distance', 'film', 'density'] as const
const anyTyped = fc.record({ quantity: fc.constantFrom(...TYPED), choices: anyChoices, hundredths: fc.integer({ min: 1, max: 50_000 }) })
const metric = unitChoices('metric')
const inch = unitChoices('inch')

describe('what was typed', () => {
  it('comes back as it was typed, in whatever unit', () => {
    fc.assert(fc.property(anyTyped, ({ quantity, choices, hundredths }) => {
      const typed = hundredths / 100
      expect(toShown(toKept(typed, quantity, choices), quantity, choices)).toBe(typed)
    }), { numRuns: 2000 })
  })

  it('comes back after it was written to a file', () => {
    fc.assert(fc.property(anyTyped, ({ quantity, choices, hundredths }) => {
      const typed = hundredths / 100
      const kept: unknown = JSON.parse(JSON.stringify(toKept(typed, quantity, choices)))
      expect(toShown(Number(kept), quantity, choices)).toBe(typed)
    }))
  })

  it('in another unit means the same, to a share of a millionth', () => {
    fc.assert(fc.property(fc.constantFrom(...QUANTITIES), anyChoices, fc.double({ min: 0.01, max: 1000, noNaN: true }), (quantity, choices, kept) => {
      const { toKept: back, fromKept } = unitOf(quantity, choices)
      expect(back(fromKept(kept)) / kept).toBeCloseTo(1, 9)
    }))
  })

  it('13 psi is 13 psi wherever it is typed, and 0.9 bar stays 0.9 bar where psi are shown', () => {
    const kept = readMeasure('13 psi', 'pressure', metric)!
    expect(kept).toBeCloseTo(0.8963, 4)
    expect(toShown(kept, 'pressure', inch)).toBe(13)
    expect(toShown(kept, 'pressure', metric)).toBe(0.9)
    expect(readMeasure('0,9 bar', 'pressure', inch)).toBe(0.9)
    expect(readMeasure('90 kPa', 'pressure', inch)).toBe(0.9)
  })

  it('that came from another unit is shown to the places one can set', () => {
    expect(toShown(1.4, 'pressure', inch)).toBe(20.3)
    expect(toShown(1.4, 'pressure', unitChoices('metric', { pressure: 'kPa' }))).toBe(140)
    expect(toShown(10, 'distance', inch)).toBe(3.94)
    expect(toShown(21, 'temperature', inch)).toBe(69.8)
  })
})

describe('reading', () => {
  it.each([['1,5', 1.5], ['.5', 0.5], ['2.', 2], ['3/8', 0.375], ['1 1/2', 1.5], ['−3', -3], ['1/0', null], ['', null], ['a', null], ['1.2.3', null], ['1e3', null]])('%s is %s', (typed, value) => {
    expect(readNumber(typed)).toBe(value)
  })

  it.each([
    ['70 °F', 'temperature', 70, inch], ['70 F', 'temperature', 70, inch], ['21', 'temperature', 69.8, inch], ['4 in', 'distance', 4, inch], ['4"', 'distance', 4, inch],
    ['2 FL OZ', 'volume', 2, inch], ['2 oz', 'mass', 2, inch], ['1/2 in', 'distance', 0.5, inch],
  ] as const)('%s of %s', (typed, quantity, shown, choices) => {
    expect(toShown(readMeasure(typed, quantity, metric)!, quantity, choices)).toBe(shown)
  })

  it.each([['13 g', 'pressure'], ['13 furlongs', 'length'], ['thirteen', 'pressure'], ['2 oz', 'volume']] as const)('%s is no %s', (typed, quantity) => {
    expect(readMeasure(typed, quantity, metric)).toBeNull()
  })
})

describe('figures to read', () => {
  it.each([[0.123456, '0.123'], [1.5, '1.5'], [12.345, '12.3'], [1234.5, '1235'], [0, '0'], [0.0001, '0.0001']])('%d is %s', (value, shown) => {
    expect(toDigits(value)).toBe(shown)
  })

  it('one fluid ounce of clear as mL, and what a mL of film is in square inches and mil', () => {
    expect(readable(29.5735, 'volume', inch)).toEqual({ value: '1', unit: 'fl oz' })
    expect(readable(0.7933, 'volume', metric)).toEqual({ value: '0.79', unit: 'mL' })
    expect(readable(0.0012, 'volume', metric)).toEqual({ value: '0.0012', unit: 'mL' })
    expect(readable(2 / 3, 'share', metric, 4)).toEqual({ value: '0.6667', unit: '' })
    expect(readable(1e-4, 'film volume', metric)).toEqual({ value: '0.0001', unit: 'mL/(cm² · µm)' })
    // 128 fl oz are 231 in³.
    expect(Number(readable(1e-4, 'film volume', inch, 6).value)).toBeCloseTo(128 / 231 / 1000, 8)
    expect(readable(0.07, 'money', inch)).toEqual({ value: '0.07', unit: '' })
    expect(Number(readable(0.07, 'price', inch, 6).value)).toBeCloseTo(0.07 * 29.5735, 4)
  })
})

it('a system with one unit chosen otherwise keeps the rest', () => {
  expect(unitChoices('inch', { pressure: 'bar' })).toEqual({ ...UNIT_SYSTEMS.inch, pressure: 'bar' })
  expect(MEASURED.every(measured => UNIT_CHOICES[measured][0] === UNIT_SYSTEMS.metric[measured])).toBe(true)
})

describe('planning values', () => {
  it('are the usual ones where nobody knows better, and the last word counts', () => {
    expect(planWith()).toEqual(PLANNING_VALUES)
    const plan = planWith({ room: 18, transfer: { airbrush: 0.3 } }, { room: 24, cupLoss: 1 })
    expect(plan).toEqual({ ...PLANNING_VALUES, room: 24, cupLoss: 1, transfer: { ...PLANNING_VALUES.transfer, airbrush: 0.3 } })
    expect(PlanningValues.safeParse(plan).success).toBe(true)
    expect(OwnPlanning.safeParse({}).success).toBe(true)
  })
})
