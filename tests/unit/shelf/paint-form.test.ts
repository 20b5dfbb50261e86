import { describe, expect, it } from 'vitest'
import { draftOfForm, emptyPaintForm, knownOfForm, paintFormOf, usualHow } from '~/composables/shelf/paint-form'
import { previewOf } from '~/composables/shelf/use-paint-preview'
import { DEMO_PAINTS, demoPaint, type DemoPaintName } from '#server/seed/paints'
import { paintDifferences } from '#shared/shelf/paint-differences'
import { PAINT_KINDS, PaintDraft } from '#shared/shelf/paint'
import { isSameKnown } from '#shared/shelf/same-known'

describe('the form of a paint', () => {
  it.each(Object.keys(DEMO_PAINTS) as DemoPaintName[])('says of %s what the shelf says', (name) => {
    const paint = PaintDraft.parse(demoPaint(name))
    const { value, wrong } = draftOfForm(paintFormOf(paint))
    expect(wrong).toBeUndefined()
    expect(paintDifferences(value!, paint)).toEqual([])
    expect(PaintDraft.parse(value)).toEqual(paint)
  })

  it('proposes for every kind a way of knowing that can be told', () => {
    for (const kind of PAINT_KINDS) expect(typeof usualHow(kind)).toBe('string')
    expect([usualHow('interference'), usualHow('metallic'), usualHow('opaque')]).toEqual(['pearl', 'metallic', 'two-swatches'])
  })

  it('marks each line that is missing or no colour, by its own field', () => {
    const empty = draftOfForm(emptyPaintForm())
    expect(Object.keys(empty.wrong!).sort()).toEqual(['name', 'overBlack', 'overWhite'])
    const half = draftOfForm({ ...emptyPaintForm(), name: 'Red', overBlack: 'reddish', overWhite: '60 30 20', price: 'cheap' })
    expect(half.wrong).toEqual({ overBlack: expect.stringContaining('no colour'), price: expect.stringContaining('figure') })
  })

  it('takes a decimal comma in a price, and no price for none', () => {
    const form = { ...emptyPaintForm(), name: 'Red', how: 'clear' as const }
    expect(draftOfForm({ ...form, price: '0,21' }).value).toMatchObject({ pricePerMl: 0.21 })
    expect(draftOfForm(form).value!.pricePerMl).toBeUndefined()
  })

  it('takes resin and hardener with a decimal comma, and marks a density that is none', () => {
    const form = { ...emptyPaintForm(), name: 'Clear', how: 'clear' as const, isTwoPart: true, resinDensity: '1,16' }
    expect(draftOfForm(form).value!.twoPart).toEqual({ by: 'volume', resin: 2, hardener: 1, resinDensity: 1.16 })
    expect(draftOfForm({ ...form, hardenerDensity: '11' }).wrong).toEqual({ hardenerDensity: expect.stringContaining('0.5 to 3') })
    expect(draftOfForm({ ...form, isTwoPart: false, hardenerDensity: '11' }).value!.twoPart).toBeUndefined()
  })

  it('tells a pearl by the colour its face should have, and the engine finds the thickness', () => {
    const form = { ...emptyPaintForm(), how: 'pearl' as const, wanted: '50 5 -60' }
    const known = knownOfForm(form).value!
    expect(known).toMatchObject({ how: 'flake', wanted: [50, 5, -60] })
    const { optics, steps } = previewOf(known)
    expect(optics.flake!.thickness).toBeGreaterThan(100)
    expect(steps[1]!.overBlack.face!.lab[2]).toBeLessThan(-20)
  })
})

describe('what the engine remarks on swatches', () => {
  it('is nothing when they agree', () => {
    expect(previewOf({ how: 'two-swatches', overBlack: [24, 8, 8], overWhite: [60, 20, 22], passes: 2 }).remarks).toEqual([])
  })

  it('is that they contradict each other when no film can look like both', () => {
    const { remarks, trust } = previewOf({ how: 'two-swatches', overBlack: [60, -60, 40], overWhite: [62, 60, 40], passes: 2 })
    expect(remarks.join(' ')).toContain('contradict')
    expect(trust.level).toBe(2)
  })

  it('is that it hides too well to tell its strength', () => {
    expect(previewOf({ how: 'two-swatches', overBlack: [50, 20, 20], overWhite: [50.2, 20, 20], passes: 3 }).remarks.join(' ')).toContain('thinner')
  })
})

describe('two versions of one paint', () => {
  const mine = PaintDraft.parse(demoPaint('Umber'))

  it('differ in the lines that differ, in words', () => {
    const theirs = { ...mine, name: 'Raw umber', volumeLeft: 12, hazards: ['H317'] }
    expect(paintDifferences(mine, theirs)).toEqual([
      { what: 'name', mine: 'Umber', theirs: 'Raw umber' }, { what: 'hazards', mine: 'none', theirs: 'H317' }, { what: 'left', mine: '71 mL', theirs: '12 mL' },
    ])
  })

  it('say so when only a figure of the colour is another', () => {
    const [colour] = paintDifferences(mine, { ...mine, known: { how: 'masstone-hide', masstone: [28, 8, 14], passesToHide: 3 } })
    expect(colour).toMatchObject({ what: 'colour' })
    expect(colour!.mine).not.toBe(colour!.theirs)
  })

  it('know one colour by what it says, not by the order it is written in', () => {
    expect(isSameKnown({ how: 'clear', yellowing: 0.1 }, { yellowing: 0.1, how: 'clear' })).toBe(true)
    expect(isSameKnown({ how: 'clear', yellowing: 0.1 }, { how: 'clear', yellowing: 0.2 })).toBe(false)
  })
})
