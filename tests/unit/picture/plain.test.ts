import { expect, it } from 'vitest'
import { deltaE2000 } from '#shared/optics/delta-e'
import { xyzFromLinearRgb } from '#shared/optics/screen-colour'
import { promise } from '#shared/optics/stack'
import { lightTables } from '#shared/picture/light-tables'
import { opticsOfKnown } from '#shared/shelf/optics-of-known'
import { coats, glowOfPatch, GROUND, patchLab, untonedLab } from './patch'

const bench = lightTables('bench')
const TINTED_PEARL = opticsOfKnown({ how: 'flake', oxide: 'anatase', thickness: 74, flakesPerPass: 0.55, sigma: 9, edge: 0.06, tint: { overWhite: [90.3, -2, 25], passes: 1 } })
const STACKS = [
  ['a primer', coats(['Opaque white', 3])],
  ['a glaze over white', coats(['Opaque white', 3], ['Olive green', 2])],
  ['candies over white', coats(['Opaque white', 5], ['Candy yellow', 1.5], ['Candy red', 1])],
  ['silver pearl over black', coats(['Opaque black', 3], ['Silver pearl', 2])],
  ['an interference pearl over black', coats(['Opaque black', 3], ['Blue flash', 2])],
  ['a glaze over a tinted pearl', coats(['Opaque white', 3], [TINTED_PEARL, 2.4], ['Olive green', 1])],
  ['aluminium', coats(['Opaque black', 2], ['Aluminium, fine', 2])],
  ['an interference pearl over a glaze', coats(['Opaque white', 3], ['Blue-green', 2], ['Green flash', 1])],
  ['black', coats(['Opaque black', 5])],
] as const

it.each(STACKS)('shows in a plain picture exactly what is promised: %s', (_, stack) => {
  const promised = promise({ ground: GROUND, coats: stack, finish: 'gloss' })
  expect(deltaE2000(patchLab(stack, bench, { plain: true }), promised.lab)).toBeLessThan(0.1)
})

const GLOWING = [
  ['a fluorescent over white', coats(['Opaque white', 5], ['Fluorescent orange', 2])],
  ['a thin fluorescent over white', coats(['Opaque white', 5], ['Fluorescent cerise', 0.4])],
  ['a thick fluorescent over a bare ground', coats(['Fluorescent green', 6])],
  ['a fluorescent over black', coats(['Opaque black', 4], ['Fluorescent orange', 2])],
  ['a fluorescent over a half-hiding grey', coats(['Opaque black', 0.5], ['Opaque white', 1], ['Fluorescent yellow', 2])],
  ['orange over yellow', coats(['Opaque white', 5], ['Fluorescent yellow', 2.4], ['Fluorescent orange', 1.3])],
  ['yellow over orange', coats(['Opaque white', 5], ['Fluorescent orange', 1], ['Fluorescent yellow', 2])],
  ['four fluorescents', coats(['Opaque white', 5], ['Fluorescent yellow', 2.4], ['Fluorescent green', 1], ['Fluorescent orange', 0.8], ['Fluorescent cerise', 0.5])],
  ['a fluorescent under a candy', coats(['Opaque white', 5], ['Fluorescent yellow', 2], ['Candy red', 1.5])],
  ['a fluorescent under a mist of black', coats(['Opaque white', 5], ['Fluorescent orange', 2], ['Opaque black', 0.4])],
  ['a fluorescent under a green glaze', coats(['Opaque white', 5], ['Fluorescent yellow', 2.4], ['Leaf green', 1])],
] as const

it.each(GLOWING)('shows what gives off light as it is promised, but for its brightness: %s', (_, stack) => {
  const promised = promise({ ground: GROUND, coats: stack, finish: 'gloss' })
  expect(deltaE2000(untonedLab(stack), promised.lab)).toBeLessThan(0.5)
})

it('dims what glows under a pearl as is promised', () => {
  const stack = coats(['Opaque white', 5], ['Fluorescent green', 2], ['Blue flash', 1])
  const quiet = stack.map(coat => ({ ...coat, optics: { ...coat.optics, fluorescent: undefined } }))
  const Y = (of: typeof stack) => promise({ ground: GROUND, coats: of, finish: 'gloss' }).xyz[1]
  expect(xyzFromLinearRgb(glowOfPatch(stack))[1] / (Y(stack) - Y(quiet))).toBeCloseTo(1, 1)
})

it('shows a plain picture before the clear under its veil, as it is promised', () => {
  const stack = coats(['Opaque white', 3], ['Olive green', 2])
  const promised = promise({ ground: GROUND, coats: stack, finish: 'matt' })
  expect(deltaE2000(patchLab(stack, bench, { plain: true, finish: 'matt' }), promised.lab)).toBeLessThan(0.1)
})

it('reads flakes in a plain picture at the angle asked for', () => {
  const stack = coats(['Opaque black', 3], ['Silver pearl', 2])
  const promised = promise({ ground: GROUND, coats: stack, finish: 'gloss' })
  expect(deltaE2000(patchLab(stack, bench, { plain: true, aspecular: 75 }), promised.angles![75].lab)).toBeLessThan(0.1)
})
