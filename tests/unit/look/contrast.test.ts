import { describe, expect, it } from 'vitest'
import { contrast, LIGHTS, tokensIn } from './tokens'

/** Text on its surface needs 4.5, the edge of a control 3 (WCAG 2.2, 1.4.3 and 1.4.11). */
const TEXT = 4.5
const EDGE = 3

/** What stands on what, what it needs, and the ratio the four lights were laid for (light, dark, bright, dim). */
const PAIRS: readonly (readonly [ink: string, ground: string, needs: number, laid: readonly [number, number, number, number]])[] = [
  ['flank-ink', 'flank', TEXT, [6.2, 4.5, 9.7, 7.3]],
  ['flank-ink-2', 'flank', TEXT, [4.9, 4.5, 7.9, 7.3]],
  ['flank-line', 'flank', EDGE, [6.2, 4.5, 9.7, 5.5]],
  ['belly-ink', 'belly', TEXT, [16.5, 13.3, 21, 13.9]],
  ['belly-ink-2', 'belly', TEXT, [7.9, 8.1, 12.6, 8.5]],
  ['belly-line', 'belly', EDGE, [4.4, 4.7, 8.5, 5]],
  ['back-ink', 'back', TEXT, [16.5, 17.4, 21, 15.6]],
  ['back-ink-2', 'back', TEXT, [8.7, 8.8, 13.5, 8.6]],
  ['back-line', 'back', EDGE, [4.2, 3.9, 6.1, 3.9]],
  ['next-ink', 'next', TEXT, [8.7, 8.7, 9.4, 7.3]],
  ['next-edge', 'belly', EDGE, [16.5, 6.8, 21, 6.1]],
  ['chosen-ink', 'chosen', TEXT, [18.1, 17.1, 21, 15.6]],
  ['caution-ink', 'caution', TEXT, [19.4, 16.5, 21, 17.1]],
  ['caution-ink-2', 'caution', TEXT, [9.3, 9.6, 12.6, 9.5]],
  ['ghs', 'ghs-paper', EDGE, [6, 6, 6, 6]],
  ['ring-out', 'flank', EDGE, [6.2, 4.5, 9.7, 7.3]],
]

describe('ink on its ground', () => {
  it.each(PAIRS)('%s on %s passes in every light, as it was laid', (ink, ground, needs, laid) => {
    LIGHTS.forEach((light, place) => {
      const tokens = tokensIn(light)
      const ratio = contrast(tokens[ink] ?? '', tokens[ground] ?? '')
      expect(ratio, `${light}: ${ratio.toFixed(2)}`).toBeGreaterThanOrEqual(needs)
      expect(Math.abs(ratio - (laid[place] ?? 0)), `${light}: ${ratio.toFixed(2)}`).toBeLessThan(0.1)
    })
  })

  it('keeps the second ink readable on the well and the pressed next too', () => {
    for (const light of LIGHTS) {
      const tokens = tokensIn(light)
      expect(contrast(tokens['belly-ink-2'] ?? '', tokens.well ?? '')).toBeGreaterThanOrEqual(TEXT)
      expect(contrast(tokens['next-ink'] ?? '', tokens['next-press'] ?? '')).toBeGreaterThanOrEqual(TEXT)
    }
  })
})
