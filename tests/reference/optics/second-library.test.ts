import { expect, it } from 'vitest'
import Color from 'colorjs.io'
import { type Lab, labFromXyz, lightnessOf, type Rgb } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { decodeChannel, encodeChannel, oklabFromLinear, xyzFromLinearRgb } from '../../../shared/optics/screen-colour'

const STEPS = [0, 0.25, 0.5, 0.75, 1]
const CUBE: Rgb[] = STEPS.flatMap(r => STEPS.flatMap(g => STEPS.map(b => [r, g, b] as Rgb)))
const linear = (srgb: Rgb) => srgb.map(decodeChannel) as Rgb

it('has X, Y, Z, and Oklab of the whole sRGB cube as colorjs.io has them', () => {
  for (const srgb of CUBE) {
    const theirs = new Color('srgb', srgb)
    const xyz = theirs.to('xyz-d65').coords
    xyzFromLinearRgb(linear(srgb)).forEach((value, i) => expect(Math.abs(value - xyz[i]!)).toBeLessThan(5e-4))
    const oklab = theirs.to('oklab').coords
    oklabFromLinear(linear(srgb)).forEach((value, i) => expect(Math.abs(value - oklab[i]!)).toBeLessThan(5e-4))
  }
})

it('measures the same differences as colorjs.io', () => {
  const labs = CUBE.map(srgb => labFromXyz(xyzFromLinearRgb(linear(srgb))))
  for (let i = 1; i < labs.length; i++) {
    const theirs = new Color('lab', labs[i]!).deltaE(new Color('lab', labs[i - 1]!), '2000')
    expect(deltaE2000(labs[i]!, labs[i - 1]!)).toBeCloseTo(theirs, 8)
  }
})

// Lab of the sRGB primaries under D65, from memory; tolerance 0.02
it.each<[string, Rgb, Lab]>([
  ['red', [1, 0, 0], [53.24, 80.09, 67.20]],
  ['green', [0, 1, 0], [87.73, -86.18, 83.18]],
  ['blue', [0, 0, 1], [32.30, 79.19, -107.86]],
])('puts sRGB %s where the handbooks do', (_, rgb, lab) => {
  labFromXyz(xyzFromLinearRgb(rgb)).forEach((value, i) => expect(Math.abs(value - lab[i]!)).toBeLessThan(0.02))
})

// The 18 % grey card: L* 49.496 and sRGB 118 (ISO 12232 for the 18 %; the rest worked out)
it('puts the grey card at L* 49.5 and sRGB 118', () => {
  expect(lightnessOf(0.18)).toBeCloseTo(49.496, 3)
  expect(Math.round(encodeChannel(0.18) * 255)).toBe(118)
})
