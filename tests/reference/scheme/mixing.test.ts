import { describe, expect, it } from 'vitest'
import { dryWeight } from '#shared/scheme/amounts/dry-film'
import { ML_PER_CM2_UM } from '#shared/scheme/amounts/figure'
import { potLifeAt } from '#shared/scheme/amounts/mixes'
import { densityRatio, hardenerToResin, mixedDensity, partsOf, twoParts } from '#shared/scheme/amounts/two-part'
import { PLANNING_VALUES } from '#shared/quantities/planning-values'
import { unitChoices, unitOf } from '#shared/quantities/quantities'
import { fahrenheitToCelsius, flOzToMl, inchesToMm, milToMicrometres } from '#shared/quantities/units'
import type { TwoPart } from '#shared/shelf/paint'

const FL_OZ_PER_GALLON = 128

describe('resin and hardener', () => {
  it('2 : 1 by volume that is 100 : 44 by weight has a hardener 0.880 as dense as its resin (Epoxy ratio scale, Duckworks, 2005)', () => {
    expect(densityRatio([2, 1], [100, 44])).toBeCloseTo(0.88, 12)
    expect(hardenerToResin({ by: 'volume', resin: 2, hardener: 1, resinDensity: 1.16, hardenerDensity: 1.16 * 0.88 }).weight).toBeCloseTo(0.44, 12)
  })

  it('10 g at 100 : 38 by weight are 7.246 g and 2.754 g (What is a mix ratio, Jamestown Distributors)', () => {
    const [resin, hardener] = partsOf(10, 38 / 100)
    expect(resin).toBeCloseTo(7.246, 3)
    expect(hardener).toBeCloseTo(2.754, 3)
  })

  it('1 : 1 by volume at 1.16 and 0.97 g/mL takes 83.62 g of hardener to 100 g of resin (worked out)', () => {
    expect(100 * hardenerToResin({ by: 'volume', resin: 1, hardener: 1, resinDensity: 1.16, hardenerDensity: 0.97 }).weight!).toBeCloseTo(83.62, 2)
  })

  it('4195 g a gallon are 1.1082 g/mL (worked out from the exact gallon)', () => {
    expect(4195 / flOzToMl(FL_OZ_PER_GALLON)).toBeCloseTo(1.1082, 4)
  })

  it('50 × 36 in at 10 mil are 18 in³, 0.0779 gallons, 326.9 g at 4195 g a gallon (Coverage and yield per gallon; prints 326.79)', () => {
    const area = inchesToMm(50) * inchesToMm(36) / 100
    const film = milToMicrometres(10)
    const ml = area * film * ML_PER_CM2_UM
    expect(ml / (inchesToMm(1) / 10) ** 3).toBeCloseTo(18, 9)
    expect(ml / flOzToMl(FL_OZ_PER_GALLON)).toBeCloseTo(0.0779, 4)
    const weight = dryWeight(area, film, 4195 / flOzToMl(FL_OZ_PER_GALLON)).value
    expect(weight).toBeCloseTo(326.9, 1)
    expect(Math.abs(weight / 326.79 - 1)).toBeLessThan(0.005)
  })

  it('60 cm² under 0.3 mm of 1.15 g/cm³ carry 2.07 g (worked out)', () => {
    expect(dryWeight(60, 300, 1.15).value).toBeCloseTo(2.07, 12)
  })

  it('by volume and by weight say the same mix', () => {
    const clear: TwoPart = { by: 'volume', resin: 2, hardener: 1, resinDensity: 1.16, hardenerDensity: 1.0208 }
    const { volumes, weights } = twoParts(clear, 30, 1)
    expect(volumes).toEqual({ resin: 20, hardener: 10 })
    expect(weights!.resin).toBeCloseTo(20 * 1.16, 9)
    expect(weights!.hardener).toBeCloseTo(10 * 1.0208, 9)
    expect(mixedDensity(clear)).toBeCloseTo((20 * 1.16 + 10 * 1.0208) / 30, 12)
    const { weight } = hardenerToResin(clear)
    expect(hardenerToResin({ ...clear, by: 'weight', resin: 100, hardener: 100 * weight! }).volume).toBeCloseTo(0.5, 12)
  })

  it('without both densities only the way on the label is known', () => {
    const { volumes, weights } = twoParts({ by: 'weight', resin: 100, hardener: 38, resinDensity: 1.16 }, 10, 1)
    expect(volumes).toBeNull()
    expect(weights!.resin).toBeCloseTo(7.246, 3)
  })
})

describe('pot life', () => {
  it.each([[25, 30], [15, 60], [35, 15], [21, 39.6]])('of 30 min at 25 °C is at %d °C %d min (Controlling exotherm; How epoxy pot life changes with temperature)', (celsius, minutes) => {
    expect(potLifeAt(30, celsius)).toBeCloseTo(minutes, 1)
  })

  it('halves for each 18 °F, which is 10 °C; 77 °F is 25 °C (Controlling exotherm; Temperature variation)', () => {
    const fahrenheit = unitChoices('inch')
    expect(unitOf('temperature step', fahrenheit).toKept(18)).toBeCloseTo(10, 12)
    expect(fahrenheitToCelsius(77)).toBeCloseTo(25, 12)
    expect(potLifeAt(30, fahrenheitToCelsius(77 + 18))).toBeCloseTo(15, 12)
  })

  it('a factor of 2 between 20 and 30 °C is an activation energy of 51.22 kJ/mol (Arrhenius; worked out)', () => {
    const ratio = potLifeAt(30, 20, PLANNING_VALUES.setsFaster) / potLifeAt(30, 30, PLANNING_VALUES.setsFaster)
    expect(8.314462618 * Math.log(ratio) / (1 / 293.15 - 1 / 303.15) / 1000).toBeCloseTo(51.22, 2)
  })

  it('is not told of what is no time', () => {
    expect(() => potLifeAt(0, 20)).toThrow(RangeError)
    expect(() => potLifeAt(30, 20, 0.5)).toThrow(RangeError)
  })
})
