import { describe, expect, it } from 'vitest'
import { ballastForNeutral, checkFloat, densityFromPounds, filmPart, partByMass, partByVolume, woodFromNeutralFloat } from '#shared/blank/float'
import { seaWaterDensity_EOS80, waterDensity_Kell1975, waterDensity_Tanaka2001 } from '#shared/blank/water-density'

describe('density of water', () => {
  // Tanaka et al., Metrologia 38 (2001) 301.
  it.each([[0, 999.8428], [10, 999.7027], [15, 999.1026], [20, 998.2067], [30, 995.6488]])('at %d °C follows Tanaka 2001', (celsius, density) => {
    expect(Math.abs(waterDensity_Tanaka2001(celsius) - density)).toBeLessThan(0.001)
  })
  // Kell, J. Chem. Eng. Data 20 (1975) 97.
  it.each([[20, 998.2041], [4, 999.9720]])('at %d °C follows Kell 1975', (celsius, density) => {
    expect(Math.abs(waterDensity_Kell1975(celsius) - density)).toBeLessThan(0.001)
  })
  // UNESCO Technical Papers in Marine Science 36 (1981).
  it.each([[35, 5, 1027.67547], [35, 15, 1025.9728], [35, 25, 1023.34306], [0, 5, 999.96675]])('of salinity %d at %d °C follows EOS-80', (salinity, celsius, density) => {
    expect(Math.abs(seaWaterDensity_EOS80(salinity, celsius) - density)).toBeLessThan(0.001)
  })
  it('refuses temperatures nobody fished', () => {
    expect(() => waterDensity_Tanaka2001(-5)).toThrow(RangeError)
    expect(() => seaWaterDensity_EOS80(60, 10)).toThrow(RangeError)
  })
  it('changes the lift of 30 cm³ by a few hundredths in a day and by most of a gram in the sea', () => {
    expect(30 * (waterDensity_Tanaka2001(24) - waterDensity_Tanaka2001(4)) / 1000).toBeCloseTo(-0.0803, 3)
    expect(30 * (seaWaterDensity_EOS80(35, 15) - waterDensity_Tanaka2001(15)) / 1000).toBeCloseTo(0.806, 3)
  })
})

describe('float or sink', () => {
  it('hangs 10 cm³ of wood at 0.55 with 4.935 g of lead, and finds the wood again', () => {
    const lead = ballastForNeutral([partByVolume(10, 0.55)], 1, 11.34)
    expect(lead).toBeCloseTo(4.935, 3)
    const wood = woodFromNeutralFloat(5.5, lead, 1, 11.34)
    expect(wood.volume).toBeCloseTo(10, 9)
    expect(wood.density).toBeCloseTo(0.55, 9)
  })
  it('lifts a finished body 100 x 20 x 20 by 7.058 g', () => {
    const water = waterDensity_Tanaka2001(20) / 1000
    const parts = [partByVolume(20.943951, 0.4), filmPart(5019.251, 0.3, 1.15), partByMass(6, 7.9)]
    const check = checkFloat(parts, water)
    expect(check.netLift).toBeCloseTo(7.058, 3)
    expect(check.outcome).toBe('floats')
    expect(ballastForNeutral(parts, water, 11.34)).toBeCloseTo(7.740, 3)
    const letIn = ballastForNeutral(parts, water, 11.34, 0.4)
    expect(letIn).toBeCloseTo(7.316, 3)
    // Lead let in takes the place of wood: the whole then hangs.
    const hung = checkFloat([...parts, { mass: letIn - letIn / 11.34 * 0.4, volume: 0 }], water)
    expect(hung.outcome).toBe('hangs')
  })
  it('knows the pounds per cubic foot of wood and lead charts', () => {
    expect(densityFromPounds(24.85)).toBeCloseTo(0.398, 3)
    expect(densityFromPounds(64)).toBeCloseTo(1.0252, 4)
    expect(densityFromPounds(710)).toBeCloseTo(11.373, 3)
  })
  it('refuses ballast that floats', () => {
    expect(() => ballastForNeutral([partByVolume(10, 0.5)], 1, 0.9)).toThrow(RangeError)
  })
})
