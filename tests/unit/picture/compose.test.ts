import { expect, it } from 'vitest'
import { stackReflectance } from '#shared/optics/stack'
import { toPictureBands } from '#shared/optics/to-picture-bands'
import { coatTable } from '#shared/picture/coat-table'
import { bareGround, layCoats, type LaidTable } from '#shared/picture/compose'
import { coats, GROUND } from './patch'

const ground = toPictureBands(GROUND)
const COUNT = 600
const laid = (stack: ReturnType<typeof coats>): LaidTable[] => stack.map(({ optics, passes }) => ({
  codes: Uint8Array.from({ length: COUNT }, (_, i) => i % 256), table: coatTable(optics, passes),
}))
const most = (a: ArrayLike<number>, b: ArrayLike<number>) => Math.max(...Array.from(a, (value, i) => Math.abs(value - b[i]!)))

it('lays coats as the engine does, at every thickness', () => {
  const stack = coats(['Opaque white', 3], ['Olive green', 2.4], ['Silver pearl', 2], ['Smoke', 1])
  const painted = layCoats(laid(stack), bareGround(COUNT, ground))
  for (const level of [0, 40, 90, 160, 255]) {
    const passes = stack.map(coat => ({ ...coat, passes: coat.passes * (level / 255) ** 2 }))
    const exact = toPictureBands(stackReflectance({ ground: GROUND, coats: passes, finish: 'gloss' }).internal)
    // The engine lays 36 bands; read between them, the curve may bend a little.
    expect(most(painted.subarray(level * 16, level * 16 + 16), exact)).toBeLessThan(3e-3)
  }
})

it('knows which coat lies on top: red under smoke is not smoke under red', () => {
  const one = layCoats(laid(coats(['Signal red', 2], ['Smoke', 2])), bareGround(COUNT, ground))
  const other = layCoats(laid(coats(['Smoke', 2], ['Signal red', 2])), bareGround(COUNT, ground))
  expect(most(one.subarray(250 * 16, 251 * 16), other.subarray(250 * 16, 251 * 16))).toBeGreaterThan(0.1)
})

it('leaves the ground as it was where nothing lies', () => {
  const painted = layCoats(laid(coats(['Signal red', 2], ['Aluminium, fine', 2])), bareGround(COUNT, ground))
  expect(most(painted.subarray(0, 16), ground)).toBeLessThan(1e-6)
})

it('comes to the same when a stack is laid in two goes', () => {
  const all = laid(coats(['Opaque white', 3], ['Olive green', 2.4], ['Silver pearl', 2], ['Smoke', 1]))
  const whole = layCoats(all, bareGround(COUNT, ground))
  const twoGoes = layCoats(all.slice(2), layCoats(all.slice(0, 2), bareGround(COUNT, ground)))
  expect(most(whole, twoGoes)).toBeLessThan(1e-5)
})

it('holds a thin pearl between its tabulated levels', () => {
  const [coat] = coats(['Blue flash', 3])
  const level = 37 // not one of the levels that are worked out
  const table = coatTable(coat!.optics, coat!.passes)
  const passes = coat!.passes * (level / 255) ** 2
  const exact = coatTable(coat!.optics, passes)
  expect(most(table.R.subarray(level * 16, level * 16 + 16), exact.R.subarray(255 * 16, 256 * 16))).toBeLessThan(2e-4)
})
