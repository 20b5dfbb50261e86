import { expect, it } from 'vitest'
import { deltaE2000 } from '#shared/optics/delta-e'
import { xyzFromLinearRgb } from '#shared/optics/screen-colour'
import { promise } from '#shared/optics/stack'
import type { Lab } from '#shared/optics/colorimetry'
import { exactSeen } from '#shared/optics/seen-exact'
import { seenLight } from '#shared/optics/seen-light'
import { SEEN_DAYLIGHT } from '#shared/picture/engine/seen-daylight'
import { eyeColours } from '#shared/picture/eye-colours'
import { lightTables } from '#shared/picture/light-tables'
import { opticsOfKnown } from '#shared/shelf/optics-of-known'
import { coats, glowOfPatch, GROUND, patchLab, patchLight, untonedLab } from './patch'

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

it.each([['gloss', 45], ['gloss', 110], ['matt', 75]] as const)('bends light under water as the numbers do: %s, %i° from the gloss', (finish, aspecular) => {
  const wish = { light: 'D65', water: { type: 'IB', depth: 2, distance: 1, adapted: true } } as const
  for (const stack of [coats(['Opaque black', 3], ['Silver pearl', 2]), coats(['Opaque white', 3], ['Silver pearl', 0.4], ['Olive green', 1])]) {
    const promised = promise({ ground: GROUND, coats: stack, finish }, exactSeen(wish))
    const shown = patchLab(stack, bench, { plain: true, finish, aspecular, seen: seenLight(wish) })
    expect(deltaE2000(shown, promised.angles![aspecular].lab)).toBeLessThan(0.6)
  }
})

it('gives flakes of a tent under water another lobe than in air', () => {
  const stack = coats(['Opaque black', 3], ['Silver pearl', 2])
  const water = seenLight({ light: 'D65', water: { type: 'I', depth: 0.01, distance: 0.01, adapted: true } })
  const [air, wet] = [SEEN_DAYLIGHT, water].map(seen => patchLight(stack, bench, { seen, normal: [0, 0.5, Math.sqrt(0.75)] })[1])
  expect(Math.abs(wet! / air! - 1)).toBeGreaterThan(0.05)
})

it('shows eyes on the map of two cones by what the cones take of them, greys as greys', () => {
  const seen = seenLight({ light: 'D65', eye: 'bass' })
  const eyes = { iris: [70, 30, 60], pupil: [5, 0, 0], rim: [50, 0, 0] } satisfies Record<string, Lab>
  const map = eyeColours(eyes, { eye: 'bass' }, seen)
  expect(map.rim[0]! / map.rim[2]!).toBeCloseTo(1, 1)
  // Orange: the long-wave cone takes more than the middle-wave cone, and green is their mean.
  expect(map.iris[0]!).toBeGreaterThan(map.iris[2]! * 1.3)
  expect(map.iris[1]!).toBeCloseTo((map.iris[0]! + map.iris[2]!) / 2, 2)
  expect(eyeColours(eyes, {}, SEEN_DAYLIGHT).iris[2]!).toBeLessThan(map.iris[2]!)
})
