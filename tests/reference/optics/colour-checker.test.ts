import { existsSync, readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import Color from 'colorjs.io'
import { type Lab, labFromReflectance, labFromXyz, xyzFromLab } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { screenFromXyz } from '../../../shared/optics/screen-colour'
import { spectrumFromLab } from '../../../shared/optics/spectrum-from-colour'

// The 24 patches of the ColorChecker, L*a*b* under D50, as carried by the Debian package argyll-ref.
const FILE = '/usr/share/color/argyll/ref/ColorChecker.cie'

function patches(): Lab[] {
  if (!existsSync(FILE)) throw new Error(`${FILE} is missing: install the Debian package argyll-ref`)
  const lines = readFileSync(FILE, 'utf8').split(/\r?\n/)
  const rows = lines.slice(lines.indexOf('BEGIN_DATA') + 1, lines.indexOf('END_DATA'))
  return rows.map(row => row.trim().split(/\s+/).slice(1).map(Number) as Lab)
}

it('shows every ColorChecker patch on a screen as a second library does', () => {
  for (const lab of patches()) {
    const theirs = new Color('lab', lab).to('srgb')
    const [X, Y, Z] = new Color('lab', lab).to('xyz-d65').coords as [number, number, number]
    const { srgb, outOfGamut } = screenFromXyz([X, Y, Z])
    if (outOfGamut) continue
    // The two differ by the fifth digit of the D65 white.
    srgb.forEach((channel, i) => expect(Math.abs(channel - theirs.coords[i]!)).toBeLessThan(5e-4))
  }
})

it('finds for every ColorChecker patch a reflectance that has its colour', () => {
  const all = patches()
  expect(all).toHaveLength(24)
  for (const lab of all) {
    const { reflectance, exact } = spectrumFromLab(lab)
    expect(exact).toBe(true)
    expect(deltaE2000(labFromReflectance(reflectance), lab)).toBeLessThan(1e-8)
    expect(Math.min(...reflectance)).toBeGreaterThan(0)
    expect(Math.max(...reflectance)).toBeLessThan(1)
  }
})

it('goes from Lab to X, Y, Z and back without loss', () => {
  for (const lab of patches()) expect(deltaE2000(labFromXyz(xyzFromLab(lab)), lab)).toBeLessThan(1e-10)
})
