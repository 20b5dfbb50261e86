import { expect, it } from 'vitest'
import { figureIn, letterTo, stateWords, viewWords } from '~/composables/cards/card-words'

it('sets a leading figure as a figure and leaves its comma to the words', () => {
  expect(figureIn('38, with its box')).toEqual({ figure: '38', rest: ', with its box' })
  expect(figureIn('62.50 EUR')).toEqual({ figure: '62.50', rest: ' EUR' })
  expect(figureIn('Made to order')).toBeNull()
})

it('writes a letter that keeps its link whole, whatever the title says', () => {
  const letter = new URL(letterTo({ title: 'Perch & roach, 50% grey', workshop: 'Reed bench' }, 'https://w.example/c/a-b_c'))
  expect(letter.protocol).toBe('mailto:')
  expect(letter.searchParams.get('subject')).toBe('Perch & roach, 50% grey, Reed bench')
  expect(letter.searchParams.get('body')).toContain('\nhttps://w.example/c/a-b_c\n')
})

it('says in words whether a customer can see a card', () => {
  const sharedAt = '2026-03-04T10:00:00.000Z'
  expect(stateWords({ state: 'not shared', sharedAt: null, revokedAt: null }).words).toBe('Not shared')
  expect(stateWords({ state: 'shared', sharedAt, revokedAt: null }).words).toBe('Shared since 4 March 2026')
  expect(stateWords({ state: 'revoked', sharedAt, revokedAt: '2026-03-05T10:00:00.000Z' }).words).toBe('Revoked on 5 March 2026')
})

it('tells which side a photo shows without saying the name again', () => {
  expect(viewWords('Perch in bars on Shad 80, left side', 'Perch in bars', 'Shad 80')).toBe('left side')
  expect(viewWords('close up', 'Perch in bars', 'Shad 80')).toBe('close up')
  expect(viewWords('Perch in bars', 'Perch in bars', 'Shad 80')).toBe('Perch in bars')
  expect(viewWords('', '', '')).toBe('')
})
