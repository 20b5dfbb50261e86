import { describe, expect, it } from 'vitest'
import { LIGHTS, rgb, tokensIn } from './tokens'

/** The only tokens that may carry a hue: the accent, and the frame of a pictogram. */
const HUED = new Set(['next', 'next-press', 'next-edge', 'ghs'])

describe.each(LIGHTS)('the greys in %s light', (light) => {
  const tokens = tokensIn(light)

  it('never tint what the painter judges', () => {
    const tinted = Object.entries(tokens).filter(([name, hex]) => !HUED.has(name) && new Set(rgb(hex)).size > 1)
    expect(tinted).toEqual([])
    expect(Object.keys(tokens).length).toBeGreaterThan(30)
  })

  it('lay a mid grey of Munsell N5 to N7 round every judged colour', () => {
    const grey = rgb(tokens.surround ?? '')[0]
    // N5 is sRGB 119 to the nearest step and N7 179 (ASTM D1535 value scale); the 18 % grey card is 118.
    expect(grey).toBeGreaterThanOrEqual(118)
    expect(grey).toBeLessThanOrEqual(179)
  })

  it('go from a dark back over the flank to the belly', () => {
    const [back, flank] = [rgb(tokens.back ?? '')[0], rgb(tokens.flank ?? '')[0]]
    expect(back).toBeLessThan(flank)
  })
})
