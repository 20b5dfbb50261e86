import { expect, it } from 'vitest'
import { contrastRatio, passesToCover, passesToHide } from '../../../shared/optics/hiding'
import { filmOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'

it('finds the passes to hide that a paint was told by', () => {
  const optics = paintOpticsFrom({ how: 'masstone-hide', masstone: [52, 40, 30], passesToHide: 4 })
  expect(passesToHide(optics)).toBeCloseTo(4, 1)
  expect(contrastRatio(optics, 4)).toBeCloseTo(0.98, 3)
})
it('shows nothing but the grounds through no passes', () => {
  expect(contrastRatio(paintOpticsFrom({ how: 'clear' }), 0)).toBeCloseTo(0, 12)
})
it('says of a candy that it will not hide', () => {
  expect(passesToHide(paintOpticsFrom({ how: 'dye-over-white', overWhite: [60, 55, 50], passes: 2 }))).toBeUndefined()
})
// 1 − 0.65ⁿ = 0.98 and 1 − 0.5ⁿ = 0.98, worked out
it.each([[0.35, 9.08], [0.5, 5.64]])('covers 98 %% at %d a pass in %d passes', (perPass, passes) => {
  expect(passesToCover(perPass)).toBeCloseTo(passes, 2)
})
it('hides a black over both grounds though nothing comes back to compare', () => {
  expect(passesToHide(filmOptics(new Float64Array(36).fill(3), new Float64Array(36)))).toBeGreaterThan(0)
})
