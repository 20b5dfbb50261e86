import fc from 'fast-check'
import { expect, it } from 'vitest'
import { type Lab, labFromReflectance, labFromXyz } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { LIGHTS } from '../../../shared/optics/lights'
import { xyzFromLinearRgb } from '../../../shared/optics/screen-colour'
import { ratioFromXyz, spectrumFromLab } from '../../../shared/optics/spectrum-from-colour'
import { xyzFromReflectance } from '../../../shared/optics/colorimetry'
import { linearRgb, share } from './draws'

it('finds for any colour of a screen a reflectance that has it', () => {
  fc.assert(fc.property(linearRgb, (rgb) => {
    // Darker and brighter than these the colour is brought to what paint can reach.
    if (Math.min(...xyzFromLinearRgb(rgb)) < 2e-4 || Math.min(...rgb) > 0.99) return
    const lab = labFromXyz(xyzFromLinearRgb(rgb))
    const { reflectance, exact } = spectrumFromLab(lab)
    expect(exact).toBe(true)
    expect(deltaE2000(labFromReflectance(reflectance), lab)).toBeLessThan(1e-8)
    expect(reflectance.every(value => value >= 0 && value <= 1)).toBe(true)
  }))
})
it('finds a flat reflectance for a grey under any light', () => {
  fc.assert(fc.property(fc.double({ min: 2, max: 99, noNaN: true }), fc.constantFrom(...LIGHTS), (L, light) => {
    const { reflectance } = spectrumFromLab([L, 0, 0], light)
    expect(Math.max(...reflectance) - Math.min(...reflectance)).toBeLessThan(1e-9)
  }))
})
it('works under lights with lines', () => {
  const lab: Lab = [55, 30, 40]
  expect(deltaE2000(labFromReflectance(spectrumFromLab(lab, 'F11').reflectance, 'F11'), lab)).toBeLessThan(1e-8)
})
it('owns up to a colour that no surface can have, and takes the nearest paler one', () => {
  const { reflectance, exact } = spectrumFromLab([50, 150, -150])
  expect(exact).toBe(false)
  const [L, a, b] = labFromReflectance(reflectance)
  expect(L).toBeCloseTo(50, 3)
  expect(a).toBeGreaterThan(20)
  expect(b).toBeLessThan(-20)
})
it('finds a ratio that turns the lighter swatch into the darker one', () => {
  const lighter = spectrumFromLab([70, 20, 50]).reflectance
  fc.assert(fc.property(share, share, (r, g) => {
    const darker = xyzFromReflectance(lighter.map((value, i) => value * (0.05 + 0.9 * (i < 18 ? r : g))))
    const { reflectance } = ratioFromXyz(lighter, darker)
    xyzFromReflectance(lighter.map((value, i) => value * reflectance[i]!)).forEach((value, c) => expect(value).toBeCloseTo(darker[c]!, 8))
  }), { numRuns: 30 })
})
