import { describe, expect, it } from 'vitest'
import { carryWords } from '~/composables/build/carry-words'
import { coverAt } from '~/composables/build/film-cover'
import { filmDrawing, levelOf } from '~/composables/build/film-drawing'
import { filmRows, rowMiddles } from '~/composables/build/film-rows'
import { BUILT_IN_BLANKS } from '#shared/blank/built-in-blanks'
import { body, coat, mask, paint } from '../scheme/bodies'

const blank = { length: 110, halfGirth: 34 }
const materials = { paints: [paint(1)], blank: { id: 'x', shape: BUILT_IN_BLANKS[0]! } }
const lookOf = (...rows: Parameters<typeof body>) => ({ body: body(...rows), materials })

describe('a cut through the film', () => {
  it('has paint where its zone is and none beyond a hard edge', () => {
    const onBack = { coat: coat(1, { where: { body: true, zones: ['back'], reach: 0, edge: 'hard', fins: [] } }), masks: [] }
    expect(coverAt(onBack, 0.05, blank)).toBe(1)
    expect(coverAt(onBack, 0.6, blank)).toBe(0)
  })

  it('has less paint where the airbrush does not look', () => {
    const fromAbove = { coat: coat(1, { gun: { aim: 'from', angle: 0, footprint: 1 } }), masks: [] }
    expect(coverAt(fromAbove, 0.02, blank)).toBeGreaterThan(0.9)
    expect(coverAt(fromAbove, 0.95, blank)).toBe(0)
  })

  it('has teeth under a mesh', () => {
    const covers = Array.from({ length: 200 }, (_, i) => coverAt({ coat: coat(1), masks: [mask(1)] }, i / 200, blank))
    expect(new Set(covers)).toEqual(new Set([0, 1]))
  })

  it('is as thick as the film it stands for', () => {
    const two = filmDrawing(lookOf(1, 2), blank, 400)
    const middle = 64
    const [first, second] = two.strata.map(stratum => (stratum.top[middle] ?? 0) - (stratum.base[middle] ?? 0))
    expect(first).toBeCloseTo((two.strata[0]?.film ?? 0) * two.scale, -0.5)
    expect((second ?? 0) / (first ?? 1)).toBeGreaterThan(0.85)
  })

  it('never sinks from one coat to the next', () => {
    const { strata } = filmDrawing(lookOf('+1', 1, 2, '-1', 3, 4), blank, 400)
    for (const { base, top } of strata) expect(top.every((high, i) => high >= (base[i] ?? 0) - 1e-9)).toBe(true)
  })

  it('shows its levels in the order of the coats', () => {
    const drawing = filmDrawing(lookOf(1, 2, 3), blank, 400)
    const levels = ['ground', ...drawing.strata.map(stratum => stratum.coatId)].map(upTo => levelOf(drawing, upTo))
    expect([...levels].sort((x, y) => x - y)).toEqual(levels)
    expect(levelOf(drawing, 'all')).toBe(levels.at(-1))
  })
})

describe('the rows beside a section', () => {
  it('stand with the last coat first, and the ends of a bracket between them', () => {
    const rows = filmRows(body(1, '+1', 2, 3, '-1', 4))
    expect(rows.map(row => row.is === 'coat' ? row.number : row.act)).toEqual([4, 'lift', 3, 2, 'fit', 1])
    expect(rows.filter(row => row.within.length > 0).map(row => row.is === 'coat' && row.number)).toEqual([3, 2])
  })

  it('are evenly spaced but for the ends', () => {
    const { middles, height } = rowMiddles(filmRows(body(1, '+1', 2, '-1')))
    expect([...middles.values()]).toEqual([0.75, 2])
    expect(height).toBe(2.5)
  })
})

describe('a coat that is carried', () => {
  const paints = [{ id: 'x', name: 'X' }]
  it('says what it lies on, where, and inside what', () => {
    const scheme = body(1, '+1', 2, 3, '-1')
    scheme.stack = scheme.stack.map((item, i) => item.act === 'coat' ? { act: 'coat', coat: { ...item.coat, name: `Coat ${'ABCDE'[i]}` } } : item)
    expect(carryWords(scheme, 3, paints)).toBe('Above Coat C, 3 of 3, inside Mask 1')
    expect(carryWords(scheme, 0, paints)).toBe('On the ground, 1 of 3')
  })

  it('says round how many coats an end of a mask lies', () => {
    const scheme = body(1, '+1', 2, 3, '-1')
    expect(carryWords(scheme, 4, paints)).toMatch(/, round 2 coats$/)
  })
})
