import { expect, it } from 'vitest'
import { deltaE2000 } from '#shared/optics/delta-e'
import { promise } from '#shared/optics/stack'
import { lightTables } from '#shared/picture/light-tables'
import { coats, GROUND, patchLab } from './patch'

const bench = lightTables('bench')
const STACKS = [
  ['a primer', coats(['opaque white', 3])],
  ['a glaze over white', coats(['opaque white', 3], ['olive', 2])],
  ['candies over white', coats(['opaque white', 5], ['candy yellow', 1.5], ['candy red', 1])],
  ['silver pearl over black', coats(['opaque black', 3], ['silver pearl', 2])],
  ['an interference pearl over black', coats(['opaque black', 3], ['blue interference', 2])],
  ['a glaze over a tinted pearl', coats(['opaque white', 3], ['gold pearl, tinted', 2.4], ['olive', 1])],
  ['aluminium', coats(['opaque black', 2], ['aluminium', 2])],
  ['an interference pearl over a glaze', coats(['opaque white', 3], ['blue-green', 2], ['green interference', 1])],
  ['black', coats(['opaque black', 5])],
] as const

it.each(STACKS)('shows in a plain picture exactly what is promised: %s', (_, stack) => {
  const promised = promise({ ground: GROUND, coats: stack, finish: 'gloss' })
  expect(deltaE2000(patchLab(stack, bench, { plain: true }), promised.lab)).toBeLessThan(0.1)
})

it('shows a plain picture before the clear under its veil, as it is promised', () => {
  const stack = coats(['opaque white', 3], ['olive', 2])
  const promised = promise({ ground: GROUND, coats: stack, finish: 'matt' })
  expect(deltaE2000(patchLab(stack, bench, { plain: true, finish: 'matt' }), promised.lab)).toBeLessThan(0.1)
})

it('reads flakes in a plain picture at the angle asked for', () => {
  const stack = coats(['opaque black', 3], ['silver pearl', 2])
  const promised = promise({ ground: GROUND, coats: stack, finish: 'gloss' })
  expect(deltaE2000(patchLab(stack, bench, { plain: true, aspecular: 75 }), promised.angles![75].lab)).toBeLessThan(0.1)
})
