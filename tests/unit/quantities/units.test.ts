import { describe, expect, it } from 'vitest'
import fc from 'fast-check'
import * as units from '#shared/quantities/units'

describe('published equivalents', () => {
  it('1 bar is 14.5038 psi, 2 bar 29.008 (from the exact definitions of pound, inch and standard gravity)', () => {
    expect(units.barToPsi(1)).toBeCloseTo(14.5038, 4)
    expect(units.barToPsi(2)).toBeCloseTo(29.008, 3)
  })

  it('25 psi is 1.7237 bar, 0.4 MPa 58.02 psi', () => {
    expect(units.psiToBar(25)).toBeCloseTo(1.7237, 4)
    expect(units.barToPsi(4)).toBeCloseTo(58.02, 2)
  })

  it('1.3 to 2.0 bar is 18.85 to 29.01 psi (a vehicle repair manual prints 20 to 30)', () => {
    expect([1.3, 2].map(units.barToPsi).map(psi => psi.toFixed(2))).toEqual(['18.85', '29.01'])
  })

  it('25 to 116 psi is 172.4 to 799.8 kPa (Rule 1145, South Coast AQMD, 1997)', () => {
    expect([25, 116].map(psi => (units.psiToBar(psi) * 100).toFixed(1))).toEqual(['172.4', '799.8'])
  })

  it('77 °F is 25 °C; 18 °F of difference are 10 °C', () => {
    expect(units.fahrenheitToCelsius(77)).toBeCloseTo(25, 12)
    expect(units.fahrenheitToCelsius(50) - units.fahrenheitToCelsius(32)).toBeCloseTo(10, 12)
  })

  it('1 oz is 28.3495 g, ½ oz 14.175 g, 3 fl oz 88.72 mL (exact definitions)', () => {
    expect(units.ouncesToGrams(1)).toBeCloseTo(28.3495, 4)
    expect(units.ouncesToGrams(0.5)).toBeCloseTo(14.175, 3)
    expect(units.flOzToMl(3)).toBeCloseTo(88.72, 2)
  })
})

it.each([
  [units.barToPsi, units.psiToBar], [units.mmToInches, units.inchesToMm], [units.micrometresToMil, units.milToMicrometres],
  [units.celsiusToFahrenheit, units.fahrenheitToCelsius], [units.mlToFlOz, units.flOzToMl], [units.gramsToOunces, units.ouncesToGrams],
] as const)('%o there and back is where one started', (there, back) => {
  fc.assert(fc.property(fc.double({ min: -1e4, max: 1e4, noNaN: true }), (value) => {
    expect(back(there(value))).toBeCloseTo(value, 8)
  }))
})
