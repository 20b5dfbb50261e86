import { existsSync, readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import d65 from '../../../shared/optics/data/light-d65.json'
import a from '../../../shared/optics/data/light-a.json'
import observer from '../../../shared/optics/data/cie-1931-observer.json'
import { daylightChromaticity, kelvinLight } from '../../../shared/optics/kelvin-light'

/** Chromaticity straight from the 5 nm table. */
function chromaticity(power: readonly number[]): [number, number] {
  const sum = (matching: number[]) => power.reduce((total, value, i) => total + value * matching[i]!, 0)
  const [X, Y, Z] = [sum(observer.x), sum(observer.y), sum(observer.z)] as const
  return [X / (X + Y + Z), Y / (X + Y + Z)]
}

// The nominal temperatures grew by 1.4388/1.4380 when the second radiation constant was measured anew: D65 lies at 6504 K.
const nominal = (kelvin: number) => kelvin * 1.4388 / 1.4380

// Chromaticities of CIE 015, from memory.
it.each([['D50', 5000, 0.34567, 0.35850], ['D55', 5500, 0.33242, 0.34743], ['D65', 6500, 0.31272, 0.32903], ['D75', 7500, 0.29902, 0.31485]] as const)('has the published chromaticity of %s', (_, kelvin, x, y) => {
  const [ours, theirs] = chromaticity(kelvinLight(nominal(kelvin)).power)
  expect(Math.abs(ours - x)).toBeLessThan(2e-4)
  expect(Math.abs(theirs - y)).toBeLessThan(2e-4)
  const [seriesX, seriesY] = daylightChromaticity(nominal(kelvin))
  expect(Math.abs(seriesX - x)).toBeLessThan(2e-4)
  expect(Math.abs(seriesY - y)).toBeLessThan(2e-4)
})

it('gives back the table of D65', () => {
  const { power } = kelvinLight(nominal(6500))
  const worst = Math.max(...power.map((value, i) => Math.abs(value / d65.power[i]! - 1)))
  expect(worst).toBeLessThan(5e-4)
})

it.each([['D50', 5000], ['D55', 5500]] as const)('gives back the table of %s that colord-data carries', (name, kelvin) => {
  const file = `/usr/share/colord/illuminant/CIE-${name}.sp`
  if (!existsSync(file)) throw new Error(`${file} is missing: install the Debian package colord-data`)
  const lines = readFileSync(file, 'utf8').split(/\r?\n/)
  const names = lines.find(line => line.trim().startsWith('SPEC_'))!.trim().split(/\s+/).map(each => Number(each.slice(5)))
  const values = lines[lines.indexOf('BEGIN_DATA') + 1]!.trim().split(/\s+/).map(Number)
  const table = new Map(names.map((nm, i) => [nm > 9999 ? nm / 1000 : nm, values[i]!]))
  const { power } = kelvinLight(nominal(kelvin))
  const ratios = power.map((value, i) => value / table.get(380 + 5 * i)!)
  // The table's two factors are rounded to three decimals.
  expect(Math.max(...ratios.map(ratio => Math.abs(ratio / ratios[36]! - 1)))).toBeLessThan(4e-3)
})

it('glows at 2856 K as the filament of light A does', () => {
  const { power } = kelvinLight(2856)
  expect(Math.max(...power.map((value, i) => Math.abs(value / a.power[i]! - 1)))).toBeLessThan(1e-3)
})
