import { expect, it } from 'vitest'
import { bassCatchOf, bassMap } from '../../../shared/optics/bass-map'
import { BASS_MAP_WORDS, bassMapWords } from '../../../shared/optics/bass-words'
import type { Lab, Rgb } from '../../../shared/optics/colorimetry'
import { CARD_WHITE, groundFromLab } from '../../../shared/optics/known-film'
import { paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { exactSeen } from '../../../shared/optics/seen-exact'
import { seenLight, type SeenWish } from '../../../shared/optics/seen-light'
import type { Stack } from '../../../shared/optics/stack'
import { measuredSpectrum } from '../../../shared/optics/surface'
import { toPictureBands } from '../../../shared/optics/to-picture-bands'

const bare = (lab: Lab): Stack => ({ ground: groundFromLab(lab), coats: [], finish: 'gloss' })
const places = [
  { key: 'back', stack: bare([50, -50, 35]) }, { key: 'gill', stack: bare([45, 60, 40]) }, { key: 'flank', stack: bare([88, -22, 80]) }, { key: 'belly', stack: bare([94, 0, 2]) },
]
const daylight: SeenWish = { light: 'D65', eye: 'bass' }
const shown = (wish: SeenWish, stack: Stack): Rgb => {
  const { reflected, surface } = seenLight(wish)
  const seen = measuredSpectrum(toPictureBands(stack.ground), 'gloss', undefined, surface)
  return [0, 1, 2].map(row => seen.reduce((sum, value, b) => sum + reflected[16 * row + b]! * value, 0)) as Rgb
}

// Mitchem et al., Current Zoology 65 (2019): red told from green, chartreuse not told from white by colour.
it('parts a red gill from a green back and not a chartreuse flank from a white belly', () => {
  const [first, second] = bassMap(places, [['back', 'gill'], ['flank', 'belly']], daylight)
  expect(first!.by).toBe('colour')
  expect(second!.by).not.toBe('colour')
  expect(first!.pair).toEqual(['back', 'gill'])
})
it('draws in its picture just what the two cones take', () => {
  for (const wish of [daylight, { ...daylight, water: { type: '3C', depth: 4, distance: 1, adapted: true } } satisfies SeenWish]) {
    for (const { stack } of places) {
      const { green, red } = bassCatchOf(stack, exactSeen(wish))
      const [r, g, b] = shown(wish, stack)
      expect(Math.abs(r - red)).toBeLessThan(0.006)
      expect(Math.abs(b - green)).toBeLessThan(0.006)
      expect(g).toBeCloseTo((r + b) / 2, 5)
    }
  }
})
it('leaves greys grey in its picture', () => {
  const [r, g, b] = shown(daylight, bare([60, 0, 0]))
  expect(Math.max(r, g, b) - Math.min(r, g, b)).toBeLessThan(2e-3)
})
it('counts what a fluorescent gives off', () => {
  const orange = paintOpticsFrom({ how: 'dye-over-white', overWhite: [66, 60, 72], passes: 2, fluorescent: { peak: 603, width: 56, quantumYield: 0.9 } })
  const stack: Stack = { ground: groundFromLab(CARD_WHITE), coats: [{ optics: orange, passes: 2 }], finish: 'gloss' }
  const dull: Stack = { ...stack, coats: [{ optics: { ...orange, fluorescent: undefined }, passes: 2 }] }
  const seen = exactSeen({ light: 'D65', water: { type: '5C', depth: 5, distance: 0, adapted: true } })
  expect(bassCatchOf(stack, seen).red).toBeGreaterThan(1.3 * bassCatchOf(dull, seen).red)
})
it('speaks of cones and never of what catches', () => {
  const words = [BASS_MAP_WORDS, ...bassMapWords([
    { names: ['back', 'gill cover'], by: 'colour' }, { names: ['gill cover', 'flank'], by: 'colour' }, { names: ['flank', 'belly'], by: 'brightness' }, { names: ['belly', 'throat'], by: 'nothing' },
  ])]
  expect(words.slice(1)).toEqual([
    'What a largemouth bass’s two cones would tell apart, by colour: back from gill cover and gill cover from flank.',
    'By brightness alone: flank from belly.',
    'Not at all: belly from throat.',
  ])
  for (const sentence of words) expect(sentence).not.toMatch(/catch|bite|strike|better/)
})
it('refuses a pair that is not there', () => {
  expect(() => bassMap(places, [['back', 'fin']], daylight)).toThrow(/fin/)
})
