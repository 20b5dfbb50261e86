import { expect, it } from 'vitest'
import { deltaE2000 } from '#shared/optics/delta-e'
import { xyzFromLinearRgb } from '#shared/optics/screen-colour'
import { promise } from '#shared/optics/stack'
import { lightTables } from '#shared/picture/light-tables'
import { coats, glowOfPatch, GROUND, patchLab, untonedLab } from './patch'

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

const GLOWING = [
  ['a fluorescent over white', coats(['opaque white', 5], ['fluorescent orange', 2])],
  ['a thin fluorescent over white', coats(['opaque white', 5], ['fluorescent cerise', 0.4])],
  ['a thick fluorescent over a bare ground', coats(['fluorescent green', 6])],
  ['a fluorescent over black', coats(['opaque black', 4], ['fluorescent orange', 2])],
  ['a fluorescent over a half-hiding grey', coats(['opaque black', 0.5], ['opaque white', 1], ['fluorescent yellow', 2])],
  ['orange over yellow', coats(['opaque white', 5], ['fluorescent yellow', 2.4], ['fluorescent orange', 1.3])],
  ['yellow over orange', coats(['opaque white', 5], ['fluorescent orange', 1], ['fluorescent yellow', 2])],
  ['four fluorescents', coats(['opaque white', 5], ['fluorescent yellow', 2.4], ['fluorescent green', 1], ['fluorescent orange', 0.8], ['fluorescent cerise', 0.5])],
  ['a fluorescent under a candy', coats(['opaque white', 5], ['fluorescent yellow', 2], ['candy red', 1.5])],
  ['a fluorescent under a mist of black', coats(['opaque white', 5], ['fluorescent orange', 2], ['opaque black', 0.4])],
  ['a fluorescent under a green glaze', coats(['opaque white', 5], ['fluorescent yellow', 2.4], ['green', 1])],
] as const

it.each(GLOWING)('shows what gives off light as it is promised, but for its brightness: %s', (_, stack) => {
  const promised = promise({ ground: GROUND, coats: stack, finish: 'gloss' })
  expect(deltaE2000(untonedLab(stack), promised.lab)).toBeLessThan(0.5)
})

it('dims what glows under a pearl as is promised', () => {
  const stack = coats(['opaque white', 5], ['fluorescent green', 2], ['blue interference', 1])
  const quiet = stack.map(coat => ({ ...coat, optics: { ...coat.optics, fluorescent: undefined } }))
  const Y = (of: typeof stack) => promise({ ground: GROUND, coats: of, finish: 'gloss' }).xyz[1]
  expect(xyzFromLinearRgb(glowOfPatch(stack))[1] / (Y(stack) - Y(quiet))).toBeCloseTo(1, 1)
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
