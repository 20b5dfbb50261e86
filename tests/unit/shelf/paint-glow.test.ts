import { expect, it } from 'vitest'
import { opticsOfKnown } from '#shared/shelf/optics-of-known'
import type { PaintKnown } from '#shared/shelf/paint'
import { paintSwatches } from '#shared/shelf/paint-swatches'
import { paintTrust } from '#shared/shelf/paint-trust'
import { StoredOptics } from '#shared/shelf/stored-optics'

const KNOWN: PaintKnown = { how: 'fluorescent', overWhite: [66, 60, 72], passes: 2, haze: 0.012, emissionPeak: 603, emissionWidth: 56, quantumYield: 0.93 }
const optics = opticsOfKnown(KNOWN)
/** As engine 1 stored it. */
const old = { ...optics, engineVersion: '1', fluorescent: { peak: 603, width: 56, quantumYield: 0.93 } }

it('keeps with a fluorescent what feeds its glow when it is stored', () => {
  expect(StoredOptics.parse(JSON.parse(JSON.stringify(optics)))).toEqual(optics)
  expect(StoredOptics.parse(JSON.parse(JSON.stringify(old)))).toEqual(old)
})
it('shows a fluorescent brighter than its dye over white and dull over black', () => {
  const [L] = paintSwatches(optics).lab, [dye] = paintSwatches(old).lab
  expect(L - dye).toBeGreaterThan(15)
  expect(paintSwatches(optics).overBlack).toMatch(/^#[0-9]/)
})
it('says that the glow is an estimate, and of what was stored without one that saving it again brings it', () => {
  expect(paintTrust(KNOWN, optics).words).toMatch(/fade/)
  expect(paintTrust(KNOWN, old).words).toMatch(/save the paint again/)
})
