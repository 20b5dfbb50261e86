import { describe, expect, it } from 'vitest'
import type { CardDraft } from '#shared/cards/card'
import { mergeDrafts, sameDraft } from '#shared/cards/merge-drafts'

const base: CardDraft = { title: 'Perch in bars', words: 'Bars', fish: 'Perch', sizes: '90 mm', price: '', leadTime: '', photoIds: ['a', 'b'], showsChips: true }

describe('two people changing one card', () => {
  it('keep both changes when they wrote on different lines', () => {
    const { draft, clashes, theirs } = mergeDrafts(base, { ...base, words: 'Bars at dusk' }, { ...base, price: '38', photoIds: ['b', 'a'] })
    expect(draft).toEqual({ ...base, words: 'Bars at dusk', price: '38', photoIds: ['b', 'a'] })
    expect(clashes).toEqual([])
    expect(theirs).toEqual(['price', 'photoIds'])
  })

  it('are asked about a line both changed, and what I wrote stands meanwhile', () => {
    const { draft, clashes } = mergeDrafts(base, { ...base, price: '40' }, { ...base, price: '38', showsChips: false })
    expect(clashes).toEqual(['price'])
    expect(draft).toEqual({ ...base, price: '40', showsChips: false })
  })

  it('are asked nothing when they wrote the same', () => {
    expect(mergeDrafts(base, { ...base, price: '38 ' }, { ...base, price: '38' }).clashes).toEqual([])
  })

  it('changed nothing by a space at the end of a line', () => {
    expect(sameDraft(base, { ...base, words: 'Bars \n' })).toBe(true)
    expect(sameDraft(base, { ...base, photoIds: ['b', 'a'] })).toBe(false)
  })
})
