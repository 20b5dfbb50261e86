import { expect, it } from 'vitest'
import { colourWords, distanceWords } from '../../../shared/optics/colour-words'
import type { Lab } from '../../../shared/optics/colorimetry'

it.each<[string, Lab]>([
  ['deep olive', [34, -8, 30]],
  ['bright red', [50, 68, 48]],
  ['black', [5, 0, 0]],
  ['white', [97, 0, 1]],
  ['bright chartreuse', [88, -25, 85]],
  ['deep navy', [25, 5, -40]],
])('calls it %s', (words, lab) => {
  expect(colourWords(lab)).toBe(words)
})
it.each([[0, 'the same'], [0.8, 'barely seen'], [1.6, 'seen side by side'], [3, 'look together'], [5, 'plainly different'], [12, 'another colour']])('says of a distance of %d: %s', (distance, words) => {
  expect(distanceWords(distance)).toBe(words)
})
it('has words for every colour', () => {
  for (let L = 0; L <= 100; L += 5) for (let h = 0; h < 360; h += 7) for (const C of [0, 8, 30, 90]) {
    expect(colourWords([L, C * Math.cos(h), C * Math.sin(h)])).toMatch(/^[a-z, ]+$/)
  }
})
