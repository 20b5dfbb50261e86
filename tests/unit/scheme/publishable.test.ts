import { describe, expect, it } from 'vitest'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import type { SchemeBody } from '#shared/scheme/body'
import type { Coat } from '#shared/scheme/coat'
import { newSchemeBody, whiteBase } from '#shared/scheme/new-scheme'
import { newCoat } from '#shared/scheme/new-coat'
import { PAINT_KINDS, type PaintKnown } from '#shared/shelf/paint'
import { Coat as CoatForm } from '#shared/scheme/coat'
import { whyNotPublishable } from '#shared/scheme/publishable'
import { usedMaterials } from '#shared/scheme/used-materials'
import { body, coat, id, paint } from './bodies'

const materials = { paints: [paint(1), paint(2)], blank: { id: id('blank', 1), shape: builtInBlank('minnow-90') } }
const only = (more: Partial<Coat>): SchemeBody => ({ ...body(), stack: [{ act: 'coat', coat: coat(1, more) }] })
const where = (more: Partial<Coat['where']>): Partial<Coat> => ({ where: { body: true, zones: [], reach: 0, edge: 'fades', fins: [], ...more } })

describe('a draft', () => {
  it('with coats, paints and masks that come off again can be published', () => {
    expect(whyNotPublishable(body(1, '+1', 2, '-1'), materials)).toEqual([])
  })

  it.each<[string, SchemeBody, string]>([
    ['without coats', body(), 'There are no coats yet.'],
    ['with an empty cup', only({ name: 'bars', mix: { parts: [], reducer: 3 } }), 'Coat 1, “bars”, has no paint in its cup.'],
    ['with a paint that is gone', only({ mix: { parts: [{ paintId: id('paint', 9), drops: 1 }], reducer: 0 } }), 'Coat 1 uses a paint that is not on the shelf.'],
    ['with a coat that lies nowhere', only(where({ body: false })), 'Coat 1 lies nowhere on this blank.'],
    ['with a coat on a fin the blank does not have', only(where({ body: false, fins: [{ fin: 'sail', root: 1, tip: 1, on: 'whole' }] })), 'Coat 1 lies nowhere on this blank.'],
    ['with a coat between two places that exclude each other', only(where({ along: { from: 0.6, to: 0.4, fadeFrom: 0, fadeTo: 0 } })), 'Coat 1 lies nowhere on this blank.'],
    ['with a mask never lifted', body('+1', 1), '“Mask 1” is fitted and never lifted.'],
    ['with a mask and no coat through it', body(1, '+1', '-1'), '“Mask 1” is fitted and lifted again without a coat between.'],
  ])('%s cannot, and is told why', (_, draft, reason) => {
    expect(whyNotPublishable(draft, materials)).toContain(reason)
  })

  it('a coat drawn by hand lies on its marks, whatever its zones say', () => {
    const drawn = only({ ...where({ body: false }), marks: [{ kind: 'dots', dots: [[0.4, 0.4, 2]], soft: 0.1, grow: 0 }] })
    expect(whyNotPublishable(drawn, materials)).toEqual([])
  })
})

describe('what a revision freezes', () => {
  it('is the paints it uses, in the order of use, however the shelf is sorted', () => {
    const draft: SchemeBody = { ...body(), stack: [2, 1, 2].map((n, i) => ({ act: 'coat', coat: { ...newCoat(id('coat', i + 1), paint(n)) } })) }
    const shelf = [paint(3), paint(1), paint(2)]
    expect(usedMaterials(draft, { ...materials, paints: shelf }).paints).toEqual([paint(2), paint(1)])
    expect(usedMaterials(draft, { ...materials, paints: shelf.toReversed() })).toEqual(usedMaterials(draft, { ...materials, paints: shelf }))
  })
})

describe('a new scheme', () => {
  const hides = (masstone: [number, number, number]): PaintKnown => ({ how: 'masstone-hide', masstone, passesToHide: 5 })

  it('starts from the whitest paint that hides', () => {
    const shelf = [
      { ...paint(1), known: hides([92, 0, 3]) }, { ...paint(2), known: hides([96, -1, 1]) },
      { ...paint(3), known: hides([97, 0, 40]) }, { ...paint(4), kind: 'clear' as const, known: { how: 'clear' as const, yellowing: 0 } },
    ]
    expect(whiteBase(shelf)?.id).toBe(id('paint', 2))
    expect(whiteBase(shelf.slice(2))).toBeNull()
  })

  it('is ready to publish once the shelf has a white, and bare otherwise', () => {
    const draft = newSchemeBody(id('blank', 1), { coatId: id('coat', 1), paint: paint(1), rest: 6 })
    expect(whyNotPublishable(draft, materials)).toEqual([])
    expect(newSchemeBody(id('blank', 1)).stack).toEqual([])
  })
})

it.each(PAINT_KINDS)('a new coat of a paint that is %s can be sprayed as it stands, reduced as usual', (kind) => {
  const made = newCoat(id('coat', 1), paint(1, { kind, reducerPer100: 35 }))
  expect(CoatForm.parse(made)).toEqual(made)
  expect(made.mix.reducer / made.mix.parts[0]!.drops).toBeCloseTo(0.35, 10)
})
