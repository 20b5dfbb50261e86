import { expect, it } from 'vitest'
import type { SchemeBody } from '#shared/scheme/body'
import { mergeBodies } from '#shared/scheme/merge-bodies'
import { clashWords, takenInWords } from '#shared/scheme/merge-words'
import { after, body, id, mask, paint } from './bodies'

const materials = { paints: [paint(1)] }
const base = body(1, '+1', 2, '-1', 3)
const passes = (n: number, count: number) => after(base, [{ do: 'set-passes', coatId: id('coat', n), passes: count }])

function words(mine: SchemeBody, theirs: SchemeBody) {
  return mergeBodies(base, mine, theirs).clashes.map(clash => clashWords(clash, { base, mine, theirs, materials }))
}

it('a coat is told by its number and name, with what each side made of it', () => {
  const named = after(passes(2, 7), [{ do: 'change-coat', coatId: id('coat', 2), change: { rest: 30 } }])
  expect(words(passes(2, 4), named)).toMatchObject([{ about: 'Coat 2', mine: ['Passes: 4'], theirs: ['Passes: 7', 'Rest: rests 30 min'] }])
})

it('a coat that is gone on one side says so', () => {
  const out = after(base, [{ do: 'take-out-coat', coatId: id('coat', 3) }])
  expect(words(out, passes(3, 9))).toMatchObject([{ about: 'Coat 3', mine: ['taken out'], theirs: ['Passes: 9'] }])
})

it('a mask is told by its name and form', () => {
  const form = (pitch: number) => ({ ...base, masks: [{ ...mask(1), form: { ...mask(1).form, pitch } as typeof base.masks[number]['form'] }] })
  const [told] = words(form(2), form(3))
  expect(told?.about).toBe('Mask “Mask 1”')
  expect(told?.mine[0]).toMatch(/2 mm pitch/)
  expect(told?.theirs[0]).toMatch(/3 mm pitch/)
})

it('the order is told by what each side laid or carried', () => {
  const laid = (n: number) => body(1, '+1', 2, '-1', 3, n)
  expect(words(laid(8), laid(9))).toMatchObject([{ about: 'The order of coats and masks', mine: ['Coat 4 is new.'], theirs: ['Coat 4 is new.'] }])
})

it('what came in without a question is told as sentences', () => {
  const [mine, theirs] = [passes(1, 4), passes(3, 9)]
  expect(takenInWords(mine, mergeBodies(base, mine, theirs).body, materials)).toEqual([expect.stringMatching(/^Coat 3: passes \d+ → 9\.$/)])
  expect(takenInWords(mine, mine, materials)).toEqual([])
})
