import { describe, expect, it } from 'vitest'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import type { SchemeBody } from '#shared/scheme/body'
import type { Coat } from '#shared/scheme/coat'
import { applyEdit } from '#shared/scheme/edits'
import type { PaintSnapshot } from '#shared/scheme/materials'
import type { GroundUnder, PaintToday, SecondLook } from '#shared/scheme/second-look/finding'
import { openFindings, secondLook } from '#shared/scheme/second-look/second-look'
import type { Lab } from '#shared/shelf/paint'
import { body, coat, id, mask, paint } from './bodies'

const BLACK: Lab = [12, 0, 0], SILVER: Lab = [78, 0, 2], WHITE: Lab = [95, 0, 2]

/** Coats of paints that differ from the usual one by what is told, from the ground up. */
function look(coats: [Partial<PaintSnapshot>, Partial<Coat>?][], grounds: GroundUnder[] = [], shelf: PaintToday[] = []): SecondLook[] {
  const paints = coats.map(([more], i) => paint(i + 1, more))
  const stack: SchemeBody['stack'] = coats.map(([, more], i) => ({ act: 'coat', coat: coat(i + 1, { mix: { parts: [{ paintId: id('paint', i + 1), drops: 1 }], reducer: 0 }, ...more }) }))
  return secondLook({ ...body(), stack }, { paints, blank: { id: id('blank', 1), shape: builtInBlank('minnow-90') } }, grounds, shelf).map(finding => finding.look)
}

const over = (below: Lab, change = 10): GroundUnder[] => [{ coatId: id('coat', 1), below, change }]

describe('a ground that does not carry the coat on it', () => {
  it.each<[string, Partial<PaintSnapshot>, Lab, number, SecondLook[]]>([
    ['a candy over black', { kind: 'candy' }, BLACK, 1, ['candy-over-dark']],
    ['a candy over silver', { kind: 'candy' }, SILVER, 30, []],
    ['a fluorescent over silver', { kind: 'fluorescent' }, [70, 0, 2], 30, ['fluorescent-over-dark']],
    ['a fluorescent over white', { kind: 'fluorescent' }, WHITE, 30, []],
    ['an interference pearl over white', { kind: 'interference' }, WHITE, 6, ['interference-over-pale']],
    ['an interference pearl over black', { kind: 'interference' }, BLACK, 30, []],
    ['a pearl that nobody will see', { kind: 'pearl' }, WHITE, 0.8, ['pearl-unseen']],
    ['a pearl that is seen', { kind: 'pearl' }, WHITE, 4, []],
    ['an opaque paint over black', { kind: 'opaque' }, BLACK, 60, []],
  ])('%s', (_, kind, below, change, found) => {
    expect(look([[kind]], over(below, change))).toEqual(found)
  })

  it('says nothing of a coat whose ground is not known yet', () => {
    expect(look([[{ kind: 'candy' }]])).toEqual([])
  })
})

describe('a coat that has not rested long enough', () => {
  const epoxy = { kind: 'clear' as const, base: 'epoxy' as const }

  it.each<[string, [Partial<PaintSnapshot>, Partial<Coat>?][], SecondLook[]]>([
    ['epoxy over paint laid an hour ago', [[{}, { rest: 60 }], [epoxy]], ['clear-over-damp']],
    ['epoxy the morning after', [[{}, { rest: 600 }], [epoxy]], []],
    ['a second coat of epoxy on the first', [[{}, { rest: 600 }], [epoxy, { rest: 120 }], [epoxy]], []],
    ['solvent paint over fresh water-based', [[{}, { rest: 10 }], [{ base: 'solvent' }]], ['solvent-over-fresh']],
    ['solvent paint over water-based an hour old', [[{}, { rest: 60 }], [{ base: 'solvent' }]], []],
    ['water-based over fresh solvent paint', [[{ base: 'solvent' }, { rest: 10 }], [{}]], []],
    ['thirty heavy passes in a day', [[{ filmPerPass: 10 }, { passes: 20 }], [{ filmPerPass: 10 }, { passes: 20 }]], ['thick-for-a-day']],
    ['the same with a night between', [[{ filmPerPass: 10 }, { passes: 20, rest: 600 }], [{ filmPerPass: 10 }, { passes: 20 }]], []],
  ])('%s', (_, coats, found) => {
    expect(look(coats)).toEqual(found)
  })

  it.each<[string, Partial<Coat>, boolean]>([
    ['at once', { rest: 0 }, true],
    ['after five minutes', { rest: 5 }, false],
    ['after a minute of warm air', { rest: 1, heatSet: { seconds: 40, distance: 30 } }, false],
  ])('a mask lifted %s', (_, rest, isEarly) => {
    const stack: SchemeBody['stack'] = [{ act: 'fit', maskId: id('mask', 1) }, { act: 'coat', coat: coat(1, rest) }, { act: 'lift', maskId: id('mask', 1) }]
    const found = secondLook({ ...body(), stack, masks: [mask(1, 'Bars')] }, { paints: [paint(1)], blank: { id: id('blank', 1), shape: builtInBlank('minnow-90') } }, [], [])
    expect(found.map(finding => finding.look)).toEqual(isEarly ? ['lifted-early'] : [])
    if (isEarly) expect(found[0]!.says).toBe('“Bars” is lifted at once coat 1 is laid.')
  })
})

it('names a paint that was put away, and one of which nothing is left', () => {
  const today = (retired: boolean, volumeLeft: number): PaintToday[] => [{ id: id('paint', 1), retired, volumeLeft }]
  expect(look([[{}]], [], today(true, 30))).toEqual(['paint-retired'])
  expect(look([[{}]], [], today(false, 0))).toEqual(['paint-gone'])
  expect(look([[{}]], [], today(false, 30))).toEqual([])
})

describe('an answer', () => {
  const materials = { paints: [paint(1), paint(2, { kind: 'clear', base: 'epoxy' })], blank: { id: id('blank', 1), shape: builtInBlank('minnow-90') } }
  const rested = (rest: number): SchemeBody => ({
    ...body(),
    stack: [{ act: 'coat', coat: coat(1, { rest }) }, { act: 'coat', coat: coat(2, { mix: { parts: [{ paintId: id('paint', 2), drops: 1 }], reducer: 0 } }) }],
  })

  it('closes its warning, and opens it again when it is taken back', () => {
    const start = rested(30)
    const [finding] = secondLook(start, materials, [], [])
    const answered = applyEdit(start, { do: 'answer', key: finding!.key, known: true })
    expect(answered.ok && openFindings([finding!], answered.body)).toEqual([])
    const opened = answered.ok && applyEdit(answered.body, { do: 'answer', key: finding!.key, known: false })
    expect(opened && opened.ok && opened.body).toEqual(start)
  })

  it('no longer counts once what it was about has changed', () => {
    const [before] = secondLook(rested(30), materials, [], [])
    const later = rested(20)
    const found = secondLook(later, materials, [], [])
    expect(openFindings(found, { ...later, answered: [before!.key] })).toEqual(found)
  })
})
