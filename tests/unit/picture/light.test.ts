import { describe, expect, it } from 'vitest'
import { deltaE2000 } from '#shared/optics/delta-e'
import { promise } from '#shared/optics/stack'
import { flakeGeometry } from '#shared/optics/flake-angles'
import { atNormal, lightTables, tablesOf } from '#shared/picture/light-tables'
import { flakeLobe, flakeSlope, fresnel } from '#shared/picture/surface-lobes'
import { coats, GROUND, patchLab } from './patch'

const bench = lightTables('bench')
const tilted = (degrees: number) => Math.sin(degrees * Math.PI / 180)
const LIGHTS = [['bench', bench], ['face', lightTables('face')], ['flop', lightTables('flop')], ['a lamp at 75°', lightTables({ tilt: 75 })]] as const

describe('the tent', () => {
  it.each(LIGHTS)('gives a surface that faces the viewer exactly one: %s', (_, tables) => {
    expect(atNormal(tables.irradiance, 0, 0)).toBeCloseTo(1, 5)
  })

  it('lights a flank from above: the shoulder is brighter, the belly darker', () => {
    const lit = [-60, -30, 0, 30, 60].map(angle => atNormal(bench.irradiance, 0, tilted(angle)))
    for (let i = 1; i < lit.length; i++) expect(lit[i]).toBeGreaterThan(lit[i - 1]!)
    expect(lit[0]).toBeGreaterThan(0.45)
    expect(lit[4]).toBeLessThan(1.5)
  })

  it('lights every visible normal alike when it is a white furnace, and flakes never give more than they get', () => {
    const furnace = tablesOf({ overhead: 1, horizon: 1, floor: 1, strips: [], hole: 1 })
    for (const value of furnace.irradiance) expect(Math.abs(value - 1)).toBeLessThan(2e-3)
    for (const sigma of [8, 9, 12]) {
      const { strength } = furnace.flakes(sigma)
      expect(Math.max(...strength)).toBeLessThan(0.92)
    }
    // What is missing is lost at the film's surface and below the horizon.
    expect(atNormal(furnace.flakes(9).strength, 0, 0)).toBeCloseTo(0.85, 1)
  })
})

describe('the flake lobe', () => {
  it.each([15, 25, 45, 75])('agrees with the engine for a lamp at 45° and an eye %i° from its gloss', (aspecular) => {
    const eye = (45 - aspecular) * Math.PI / 180
    const reading = flakeLobe(Math.SQRT1_2, Math.cos(eye), Math.cos(Math.PI / 4 + eye), flakeSlope(9), { flake: 0, local: 0 })
    const { gain, cosine } = flakeGeometry(aspecular, 9)
    expect(reading.flake / gain).toBeCloseTo(1, 2)
    expect(reading.local).toBeCloseTo(cosine, 3)
  })

  it.each([
    ['silver pearl over black', coats(['Opaque black', 3], ['Silver pearl', 2])],
    ['blue interference over black', coats(['Opaque black', 3], ['Blue flash', 2])],
    ['silver pearl over white', coats(['Opaque white', 3], ['Silver pearl', 2])],
    ['aluminium over black', coats(['Opaque black', 3], ['Aluminium, fine', 2])],
  ] as const)('shows on a facing flank of the bench what the engine reads at 45°: %s', (_, stack) => {
    const shown = patchLab(stack, { ...bench, rig: { ...bench.rig, overhead: 0, horizon: 0, floor: 0, strips: [] } })
    expect(deltaE2000(shown, promise({ ground: GROUND, coats: stack, finish: 'gloss' }).lab)).toBeLessThan(3)
  })

  it('makes a pearl over black far brighter at its face than at its flop', () => {
    const stack = coats(['Opaque black', 3], ['Silver pearl', 2])
    const [face, flop] = [lightTables('face'), lightTables('flop')].map(tables => patchLab(stack, tables)[0]) as [number, number]
    expect(face - flop).toBeGreaterThan(8)
  })

  it('leaves a flat opaque paint nearly alike at face and flop', () => {
    const stack = coats(['Fin orange', 4])
    const [face, flop] = [lightTables('face'), lightTables('flop')].map(tables => patchLab(stack, tables)) as [ReturnType<typeof patchLab>, ReturnType<typeof patchLab>]
    expect(deltaE2000(face, flop)).toBeLessThan(3)
  })
})

it('mirrors 4 % straight on and everything at grazing', () => {
  expect(fresnel(1)).toBeCloseTo(0.04, 6)
  expect(fresnel(1e-6)).toBeCloseTo(1, 4)
})
