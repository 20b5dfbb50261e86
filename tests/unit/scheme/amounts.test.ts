import { describe, expect, it } from 'vitest'
import { BUILT_IN_BLANKS, builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { amounts, paintTotals, PLANNING_VALUES } from '#shared/scheme/amounts'
import type { SchemeBody } from '#shared/scheme/body'
import { GIRTH_ZONES, LENGTH_ZONES, type Coat } from '#shared/scheme/coat'
import { areaCells, coatArea } from '#shared/scheme/coat-area'
import { filmOfCoat, filmSection } from '#shared/scheme/film'
import { passesToHide, reducedSolids, reducerShare, spreadingRate, sprayedVolume, wetFilm } from '#shared/scheme/paint-formulas'
import { inchesToMm, milToMicrometres } from '#shared/quantities/units'
import { body, coat, id, paint } from './bodies'

const where = (more: Partial<Coat['where']> = {}): Pick<Coat, 'where' | 'marks'> => ({ where: { body: true, zones: [], reach: 0, edge: 'hard', fins: [], ...more }, marks: [] })
const minnow = areaCells(prepareBlank(builtInBlank('minnow-90')))

/** m²/L in ft² for each US gallon: 3.785 411 784 L, 0.092 903 04 m², both exact. */
const FT2_PER_GALLON = 3.785411784 / 0.09290304

describe('published figures of film and paint', () => {
  it('71 % solids at 125 µm spread 5.68 m²/L and lie 176.06 µm wet (Tech Note 5.3, Handy calculations; prints 5.7)', () => {
    expect(spreadingRate(71, 125)).toBeCloseTo(5.68, 2)
    expect(wetFilm(125, 71)).toBeCloseTo(176.06, 2)
  })

  it('65 % at 125 µm spread 5.20 m²/L; at 5 mil 208.52 ft² a gallon (Spreading rate)', () => {
    expect(spreadingRate(65, 125)).toBeCloseTo(5.2, 2)
    expect(spreadingRate(65, milToMicrometres(5)) * FT2_PER_GALLON).toBeCloseTo(208.52, 1)
  })

  it('one gallon of solids is 1604.17 ft² of one mil (231 in³ × 1000 / 144 in²)', () => {
    expect(spreadingRate(100, milToMicrometres(1)) * FT2_PER_GALLON).toBeCloseTo(231 * 1000 / 144, 1)
  })

  it('10 m²/L is 100 µm wet, 8 is 125 (More on spread rates)', () => {
    expect(wetFilm(30, 30)).toBeCloseTo(1000 / spreadingRate(30, 30), 12)
    expect([10, 8].map(rate => 1000 / rate)).toEqual([100, 125])
  })

  it('1 m²/L is 40.746 ft² a US gallon (worked out)', () => {
    expect(FT2_PER_GALLON).toBeCloseTo(40.746, 3)
  })

  it('40 % solids with 25 parts to 100 are 32 %, and 10 µm dry need 31.25 µm wet (worked out)', () => {
    expect(reducedSolids(40, 0.25)).toBeCloseTo(32, 12)
    expect(wetFilm(10, reducedSolids(40, 0.25))).toBeCloseTo(31.25, 12)
  })

  it('25 parts to 100 are a fifth of the mix (worked out)', () => {
    expect(reducerShare(25)).toBeCloseTo(0.2, 12)
  })

  it('160 cm² at 8 µm from 20 % solids take 2.133 mL at 30 % transfer and 0.985 at 65 % (worked out)', () => {
    expect(sprayedVolume(160, 8, 0.2, 0.3)).toBeCloseTo(2.133, 3)
    expect(sprayedVolume(160, 8, 0.2, 0.65)).toBeCloseTo(0.985, 3)
  })

  it('33 % of 4 mil wet dry to 1.32 mil (Daily report template PTS 15.20.03; prints 1.33)', () => {
    expect(wetFilm(1.32, 33)).toBeCloseTo(4, 12)
  })

  it('1 mil is 25.4 µm, 2.5 mil 63.5 µm (exact)', () => {
    expect(milToMicrometres(1)).toBeCloseTo(25.4, 12)
    expect(milToMicrometres(2.5)).toBeCloseTo(63.5, 12)
    expect(inchesToMm(1)).toBeCloseTo(25.4, 12)
  })

  it('98 % hiding takes 9.08 passes that hide 0.35 each, 5.64 that hide half (worked out)', () => {
    expect(passesToHide(0.35)).toBeCloseTo(9.08, 2)
    expect(passesToHide(0.5)).toBeCloseTo(5.64, 2)
  })

  it('nonsense is refused', () => {
    expect(() => wetFilm(10, 0)).toThrow(RangeError)
    expect(() => sprayedVolume(-1, 8, 0.2, 0.3)).toThrow(RangeError)
    expect(() => sprayedVolume(1, 8, Number.NaN, 0.3)).toThrow(RangeError)
    expect(() => passesToHide(1)).toThrow(RangeError)
  })
})

describe('the area of a coat', () => {
  it.each(BUILT_IN_BLANKS.map(blank => [blank.label, blank] as const))('all over is the whole body of %s, and the four girth zones make it up', (_, shape) => {
    const cells = areaCells(prepareBlank(shape))
    expect(coatArea(where(), cells) / cells.body).toBeCloseTo(1, 1)
    const parts = GIRTH_ZONES.map(zone => coatArea(where({ zones: [zone] }), cells))
    expect(parts.reduce((sum, part) => sum + part, 0)).toBeCloseTo(coatArea(where(), cells), 6)
    expect(Math.min(...parts)).toBeGreaterThan(0.1 * cells.body)
  })

  it('head and trunk meet at the gill edge', () => {
    const [head, trunk] = (['head', 'trunk'] as const).map(zone => coatArea(where({ zones: [zone] }), minnow))
    expect(head! + trunk!).toBeCloseTo(coatArea(where({ zones: ['head', 'trunk'] }), minnow), 6)
    expect(LENGTH_ZONES.map(zone => coatArea(where({ zones: [zone] }), minnow)).every(area => area < minnow.body)).toBe(true)
  })

  it('grows with reach and shrinks between limits', () => {
    const back = (reach: number) => coatArea(where({ zones: ['back'], reach }), minnow)
    expect(back(2)).toBeGreaterThan(back(0))
    expect(back(-1)).toBeLessThan(back(0))
    expect(coatArea(where({ along: { from: 0.25, to: 0.75, fadeFrom: 0, fadeTo: 0 } }), minnow)).toBeLessThan(0.7 * minnow.body)
  })

  it('of fins counts both faces', () => {
    expect(coatArea(where({ body: false, fins: [{ fin: 'all', root: 1, tip: 1, on: 'whole' }] }), minnow)).toBeCloseTo([...minnow.fins.values()].reduce((a, b) => a + b, 0), 9)
  })

  it('of dots is theirs on both flanks: two of 2 mm radius are 50 mm²', () => {
    const dots = { ...where(), marks: [{ kind: 'dots' as const, dots: [[0.3, 0.4, 2], [0.5, 0.4, 2]] as [number, number, number][], soft: 0.1, grow: 0 }] }
    expect(coatArea(dots, minnow)).toBeCloseTo(2 * 2 * Math.PI * 4, 9)
  })
})

describe('film', () => {
  const materials = { paints: [paint(1, { filmPerPass: 4, reducerPer100: 25 }), paint(2, { filmPerPass: 8, reducerPer100: 25 })] }

  it('is passes times the film of a pass when reduced as usual, and less when thinner', () => {
    expect(filmOfCoat(coat(1, { passes: 3 }), materials)).toBeCloseTo(12, 12)
    expect(filmOfCoat({ passes: 3, mix: { parts: [{ paintId: id('paint', 1), drops: 20 }], reducer: 30 } }, materials)).toBeCloseTo(6, 12)
    expect(filmOfCoat({ passes: 2, mix: { parts: [{ paintId: id('paint', 1), drops: 1 }, { paintId: id('paint', 2), drops: 1 }], reducer: 0 } }, materials)).toBeCloseTo(2 * 1.25 * 6, 12)
  })

  it('piles up from the ground', () => {
    const section = filmSection(body(1, '+1', 2, '-1', 3), materials)
    expect(section.map(stratum => stratum.below)).toEqual([0, section[0]!.film, section[0]!.film + section[1]!.film])
  })
})

describe('amounts', () => {
  const materials = { paints: [paint(1, { filmPerPass: 8, volumeSolids: 20, reducerPer100: 0 })] }
  const once: SchemeBody = { ...body(), stack: [{ act: 'coat', coat: coat(1, { ...where(), passes: 1, mix: { parts: [{ paintId: id('paint', 1), drops: 10 }], reducer: 5 } }) }] }
  const given = { ...PLANNING_VALUES, pieces: 10, transfer: { ...PLANNING_VALUES.transfer, airbrush: 0.3 }, cupLoss: 0 }

  it('follow the formula for the area the blank really has', () => {
    const [coatAmount] = amounts(once, materials, minnow, given)
    const film = 8 / 1.5
    expect(coatAmount!.paint.value).toBeCloseTo(10 * sprayedVolume(coatAmount!.area.value, film, 0.2, 0.3), 9)
    expect(coatAmount!.reducer.value).toBeCloseTo(coatAmount!.paint.value / 2, 9)
    expect(coatAmount!.mix.value).toBeCloseTo(coatAmount!.paint.value + coatAmount!.reducer.value, 9)
  })

  it('double with the pieces but for what the cup keeps, which is lost once a load', () => {
    const at = (pieces: number) => amounts(once, materials, minnow, { ...given, pieces, cupLoss: 0.75 })[0]!.mix.value
    expect(at(20) - 0.75).toBeCloseTo(2 * (at(10) - 0.75), 9)
  })

  it('share the cup among its paints, and add up over coats', () => {
    const two = { ...materials, paints: [...materials.paints, paint(2)] }
    const mixed: SchemeBody = { ...body(), stack: [1, 2].map(n => ({ act: 'coat', coat: coat(n, { mix: { parts: [{ paintId: id('paint', 1), drops: 3 }, { paintId: id('paint', 2), drops: 1 }], reducer: 0 } }) })) }
    const coats = amounts(mixed, two, minnow, given)
    expect(coats[0]!.paints[0]!.ml).toBeCloseTo(3 * coats[0]!.paints[1]!.ml, 9)
    expect(paintTotals(coats).reduce((sum, total) => sum + total.ml, 0)).toBeCloseTo(coats.reduce((sum, each) => sum + each.paint.value, 0), 9)
  })

  it('leave out coats without a paint and say when a cup sets', () => {
    const setting = { paints: [paint(1, { potLifeMinutes: 30 })] }
    expect(amounts({ ...body(), stack: [{ act: 'coat', coat: coat(1, { mix: { parts: [], reducer: 0 } }) }] }, setting, minnow, given)).toEqual([])
    expect(amounts(once, setting, minnow, given)[0]!.potLifeMinutes).toBe(30)
    expect(amounts(once, materials, minnow, given)[0]!.potLifeMinutes).toBeNull()
  })

  it.each([0, -1, 1.5])('are refused for %s pieces', (pieces) => {
    expect(() => amounts(once, materials, minnow, { ...given, pieces })).toThrow(RangeError)
  })
})
