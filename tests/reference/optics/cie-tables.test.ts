import { existsSync, readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import observer from '../../../shared/optics/data/cie-1931-observer.json'
import a from '../../../shared/optics/data/light-a.json'
import d65 from '../../../shared/optics/data/light-d65.json'
import f11 from '../../../shared/optics/data/light-f11.json'
import { weightsFor } from '../../../shared/optics/lights'

// CIE tables as carried by the Debian package colord-data.
const FOLDER = '/usr/share/colord'

function columnsOf(file: string): Map<number, number>[] {
  if (!existsSync(`${FOLDER}/${file}`)) throw new Error(`${FOLDER}/${file} is missing: install the Debian package colord-data`)
  const lines = readFileSync(`${FOLDER}/${file}`, 'utf8').split(/\r?\n/)
  const names = lines.find(line => line.trim().startsWith('SPEC_'))!.trim().split(/\s+/)
  const wavelengths = names.map(name => Number(name.slice(5))).map(nm => nm > 9999 ? nm / 1000 : nm)
  const rows = lines.slice(lines.indexOf('BEGIN_DATA') + 1, lines.indexOf('END_DATA'))
  return rows.map(row => new Map(row.trim().split(/\s+/).map((value, i) => [wavelengths[i]!, Number(value)])))
}

function worstRatio(ours: number[], theirs: Map<number, number>, scale: number): number {
  return Math.max(...ours.map((value, i) => {
    const expected = theirs.get(380 + 5 * i)! * scale
    return Math.abs(value - expected) / Math.max(expected, 1e-6)
  }))
}

it('carries the CIE 1931 observer', () => {
  const [x, y, z] = columnsOf('cmf/CIE1931-2deg-XYZ.cmf')
  expect(worstRatio(observer.x, x!, 1)).toBeLessThan(1e-6)
  expect(worstRatio(observer.y, y!, 1)).toBeLessThan(1e-6)
  expect(worstRatio(observer.z, z!, 1)).toBeLessThan(1e-6)
})

it.each([['D65', d65], ['A', a], ['F11', f11]])('carries the CIE light %s', (name, table) => {
  const [power] = columnsOf(`illuminant/CIE-${name}.sp`)
  expect(table.power).toHaveLength(81)
  expect(worstRatio(table.power, power!, 100)).toBeLessThan(1e-5)
})

// ASTM E308 prints D65 .95047, 1.08883 and A 1.09850, .35585; F11 1.00962, .64350. Tables at 5 nm differ in the fifth digit.
it.each([['D65', 0.95047, 1.08883], ['A', 1.0985, 0.35585], ['F11', 1.00962, 0.6435]] as const)('has the published white of %s', (light, X, Z) => {
  const { white } = weightsFor(light)
  expect(Math.abs(white[0] - X)).toBeLessThan(1e-4)
  expect(white[1]).toBeCloseTo(1, 12)
  expect(Math.abs(white[2] - Z)).toBeLessThan(1e-4)
})

// Sum of the 5 nm products themselves, without bands: a reflectance of straight lines must come out the same.
it('loses nothing of a straight-lined reflectance by going to 36 bands', () => {
  const slope = (nm: number) => 0.1 + 0.8 * (Math.min(nm, 730) - 380) / 350
  const { y } = weightsFor('F11')
  const inBands = y.reduce((sum, weight, i) => sum + weight * slope(380 + 10 * i), 0)
  let direct = 0, white = 0
  f11.power.forEach((power, i) => {
    direct += power * observer.y[i]! * slope(380 + 5 * i)
    white += power * observer.y[i]!
  })
  expect(inBands).toBeCloseTo(direct / white, 12)
})
