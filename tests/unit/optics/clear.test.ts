import { expect, it } from 'vitest'
import { xyzFromReflectance } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { coatLayer } from '../../../shared/optics/coat-layer'
import { CARD_WHITE, groundFromLab } from '../../../shared/optics/known-film'
import { weightsFor } from '../../../shared/optics/lights'
import { paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { promise, stackReflectance } from '../../../shared/optics/stack'
import { flat } from './draws'

const aged = (yellowing: number) => paintOpticsFrom({ how: 'clear', yellowing })
const over = (yellowing: number, passes: number) => stackReflectance({ ground: groundFromLab(CARD_WHITE), coats: [{ optics: aged(yellowing), passes }], finish: 'gloss' }).measured

/** Yellowness index. @source ASTM E313, D65 and the 2° observer: 1.2985 and 1.1335, from memory */
function yellowness(reflectance: Float64Array): number {
  const [X, Y, Z] = xyzFromReflectance(reflectance)
  return 100 * (1.2985 * X - 1.1335 * Z) / Y
}

it('has constants of yellowness by which a perfect white is not yellow', () => {
  const [X, , Z] = weightsFor('D65').white
  expect(Math.abs(100 * (1.2985 * X - 1.1335 * Z))).toBeLessThan(0.05)
  expect(yellowness(flat(0.5))).toBeCloseTo(0, 1)
})
it('yellows with its thickness as with its age: twice the coat is twice the absorption', () => {
  for (const passes of [1, 2, 4]) over(0.05, 2 * passes).forEach((value, i) => expect(value).toBeCloseTo(over(0.1, passes)[i]!, 12))
  const once = coatLayer(aged(0.05), 1).T, twice = coatLayer(aged(0.05), 2).T
  once.forEach((T, i) => expect(twice[i]).toBeCloseTo(T * T, 12))
})
it('grows yellower coat by coat, and never darker than its colour asks', () => {
  const indices = [0, 1, 2, 3, 5].map(passes => yellowness(over(0.04, passes)))
  indices.slice(1).forEach((YI, i) => expect(YI).toBeGreaterThan(indices[i]! + 1))
  expect(over(0.04, 5)[35]).toBeGreaterThan(0.98 * over(0, 5)[35]!)
})
it('water-white changes nothing but the finish', () => {
  const under = { ground: groundFromLab([40, 20, 10]), coats: [] }
  const clear = [{ optics: aged(0), passes: 4 }]
  expect(deltaE2000(promise({ ...under, coats: clear, finish: 'gloss' }).lab, promise({ ...under, finish: 'gloss' }).lab)).toBeLessThan(1e-9)
  const [matt, satin, gloss] = (['matt', 'satin', 'gloss'] as const).map(finish => promise({ ...under, coats: clear, finish }).lab)
  expect(matt![0] > satin![0] && satin![0] > gloss![0]).toBe(true)
})
