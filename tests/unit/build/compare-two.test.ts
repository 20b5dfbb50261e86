import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { comparison } from '~/composables/build/compare-rows'
import { commonFrame, frameScale } from '~/composables/compare/common-frame'
import { comparedTitle, sideTitle, twoBlanksWords } from '~/composables/compare/compare-words'
import { pairCoats } from '~/composables/compare/pair-coats'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { fitView } from '#shared/blank/fit-view'
import type { SchemeBody } from '#shared/scheme/body'
import { newCoat } from '#shared/scheme/new-coat'
import { applyDiff, diffBodies } from '#shared/scheme/diff'
import { coatsOf, stackFaults } from '#shared/scheme/stack-order'
import { anyBody, body, id, mask, paint } from '../scheme/bodies'

const side = (schemeN: number, name: string, number: number | null) => ({ scheme: { id: id('coat', schemeN), name }, number })

/** A body whose coats have ids of their own, each of one paint. */
const laid = (first: number, ...paints: number[]): SchemeBody => ({
  ...body(), stack: paints.map((n, i) => ({ act: 'coat', coat: newCoat(id('coat', first + i), paint(n)) })),
})
const ids = (of: SchemeBody) => coatsOf(of.stack).map(coat => Number(coat.id.slice(-12)))

describe('two schemes side by side', () => {
  it('link coats of the same paints in the same order', () => {
    const paired = pairCoats(laid(1, 1, 2, 3, 4), laid(11, 1, 9, 3, 4))
    expect(ids(paired)).toEqual([1, 12, 3, 4])
    const both = comparison({ from: { body: laid(1, 1, 2, 3, 4), materials: { paints: [] } }, to: { body: paired, materials: { paints: [] } } })
    expect(both.from.map(row => row.fate)).toEqual(['same', 'same', 'taken out', 'same'])
  })

  it('link their nets by where they come from', () => {
    const from = { ...body('+1', 1, '-1'), masks: [{ ...mask(1), fromMaskId: id('mask', 7) }] }
    const to = { ...body('+2', 3, '-2'), masks: [{ ...mask(2, 'Same net'), fromMaskId: id('mask', 7) }] }
    const paired = pairCoats(from, to)
    expect(paired.masks[0]?.id).toBe(id('mask', 1))
    expect(stackFaults(paired)).toEqual([])
  })

  it('leave a colourway as it is: its coats kept their ids', () => {
    const colourway = body(1, 2, 9)
    expect(pairCoats(body(1, 2, 3), colourway)).toBe(colourway)
  })

  it('stay finishes that can be sprayed, whatever the two are, and the difference leads from one to the other', () => {
    const renumbered = (of: SchemeBody): SchemeBody => JSON.parse(JSON.stringify(of).replaceAll('cccccccc-', 'eeeeeeee-').replaceAll('aaaaaaaa-', 'ffffffff-')) as SchemeBody
    fc.assert(fc.property(anyBody, anyBody, (from, other) => {
      const paired = pairCoats(from, renumbered(other))
      expect(stackFaults(paired)).toEqual([])
      expect(coatsOf(paired.stack)).toHaveLength(coatsOf(other.stack).length)
      expect(applyDiff(from, diffBodies(from, paired))).toEqual(paired)
    }))
  })

  it('are called by their names, two versions of one by their numbers', () => {
    const one = { from: side(1, 'Perch', 5), to: side(1, 'Perch', null) }
    const two = { from: side(1, 'Perch', 5), to: side(2, 'Pike', null) }
    expect([comparedTitle(one), sideTitle(one.from, one)]).toEqual(['Revision 5 and the draft', 'Revision 5'])
    expect([comparedTitle(two), sideTitle(two.to, two)]).toEqual(['Perch and Pike', 'Pike, the draft'])
  })
})

describe('two blanks', () => {
  const [short, long] = [builtInBlank('minnow-90'), { ...builtInBlank('minnow-90'), label: 'Long one', length: 130 }]
  const version = (n: number, shape: typeof short) => ({ ...side(n, 'Perch', null), note: '', body: body(1), materials: { paints: [], blank: { id: id('blank', n), shape } } })

  it('are named with their lengths, one blank is passed over', () => {
    expect(twoBlanksWords({ from: version(1, short), to: version(2, long) })).toMatch(/^Two blanks: .+, 90 mm, and Long one, 130 mm\. Both are drawn at one scale/)
    expect(twoBlanksWords({ from: version(1, short), to: version(1, short) })).toBe('')
  })

  it('are drawn at one scale, at which the larger just fills its picture', () => {
    const frame = commonFrame([short, long])
    const alone = commonFrame([long])
    expect(frame).toEqual({ width: Math.max(alone.width, commonFrame([short]).width), height: Math.max(alone.height, commonFrame([short]).height) })
    const own = commonFrame([short])
    const [width, tall] = [1200, own.height / own.width]
    const fitted = fitView(prepareBlank(short), { width, height: Math.round(width * tall) })
    expect(1 / frameScale(own, width, tall) / fitted.scale).toBeCloseTo(1, 2)
  })
})
