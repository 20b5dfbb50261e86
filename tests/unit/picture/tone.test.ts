import { describe, expect, it } from 'vitest'
import { oklabFromLinear, encodeChannel } from '#shared/optics/screen-colour'
import { screenCode } from '#shared/picture/screen-code'
import { addGloss, tonePaint } from '#shared/picture/tone'

const hue = (rgb: Float32Array) => {
  const [, a, b] = oklabFromLinear([rgb[0]!, rgb[1]!, rgb[2]!])
  return Math.atan2(b, a) * 180 / Math.PI
}

describe('the tone of a picture', () => {
  it.each([[1.6, 0.5, 0.1], [2.4, 0.4, 0.02], [0.3, 1.5, 0.2], [1.2, 1.1, 0.1]])('keeps the hue of paint brighter than paper: %f %f %f', (...colour) => {
    const rgb = Float32Array.from(colour)
    const before = hue(rgb)
    tonePaint(rgb, 0)
    expect(Math.max(...rgb)).toBeLessThan(1)
    expect(hue(rgb)).toBeCloseTo(before, 0)
  })

  it('never turns bright paint pale: the channels keep their proportions', () => {
    const rgb = Float32Array.of(2.4, 0.6, 0.2)
    tonePaint(rgb, 0)
    expect(rgb[1]! / rgb[0]!).toBeCloseTo(0.25, 5)
  })

  it('keeps what a screen cannot show at its hue, with less chroma', () => {
    const rgb = Float32Array.of(0.05, 0.5, -0.1)
    const before = hue(rgb)
    tonePaint(rgb, 0)
    expect(Math.min(...rgb)).toBeGreaterThanOrEqual(0)
    expect(Math.abs(hue(rgb) - before)).toBeLessThan(1)
  })

  it('turns a strong highlight white and leaves paint without one alone', () => {
    const lit = Float32Array.of(0.5, 0.1, 0.05), plain = Float32Array.from(lit)
    addGloss(lit, 0, 12)
    expect(Math.min(...lit)).toBeGreaterThan(0.95)
    addGloss(plain, 0, 0)
    expect([...plain]).toEqual([...Float32Array.of(0.5, 0.1, 0.05)])
  })

  it('encodes for the screen within a hundredth of a step', () => {
    for (let i = 0; i <= 1000; i++) expect(Math.abs(screenCode(i / 1000) - 255 * encodeChannel(i / 1000))).toBeLessThan(0.02)
  })
})
