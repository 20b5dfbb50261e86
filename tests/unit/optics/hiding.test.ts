import { expect, it } from 'vitest'
import { contrastRatio, passesToHide } from '../../../shared/optics/hiding'
import { paintOpticsFrom } from '../../../shared/optics/paint-optics'

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
