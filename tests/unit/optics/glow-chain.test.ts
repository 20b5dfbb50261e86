import { expect, it } from 'vitest'
import { BANDS_36 } from '../../../shared/optics/bands'
import { filmOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { glowAbsorption } from '../../../shared/optics/fluorescence'
import { glowingCoat } from '../../../shared/optics/glow'
import { solveGlow } from '../../../shared/optics/glow-chain'
import { filmLayer, layOver } from '../../../shared/optics/film'
import { flat } from './draws'

const bump = (middle: number, width: number, height: number) => Float64Array.from(BANDS_36, nm => height * Math.exp(-(((nm - middle) / width) ** 2)))
const total = (values: ArrayLike<number>) => Array.from(values).reduce((sum, value) => sum + value, 0)
const bell = { peak: 603, width: 56 }

/** A coat by itself: no surface, photons entering evenly. */
function alone(K: Float64Array, S: Float64Array, quantumYield: number, passes: number, ground: Float64Array, entering = flat(1)) {
  const optics = filmOptics(K, S)
  const { layers, glowers } = glowingCoat(optics, { ...bell, quantumYield, Kf: Array.from(K) }, passes)
  const sent = layOver(filmLayer(K, S, passes), ground).map((R, i) => R * entering[i]!)
  return { ...solveGlow({ layers, glowers, ground, inside: 0 }, entering), sent, glowers }
}

it.each([[0.1, 0], [0.6, 0.05], [3, 0.5], [0.6, 8]])('gives back every photon when none is lost: absorption %d, scattering %d', (K, S) => {
  const { out, sent } = alone(bump(470, 90, K), flat(S), 1, 2, flat(1))
  expect(Math.abs(total(out) + total(sent) - 36) / 36).toBeLessThan(4e-15)
})
it('gives back every photon even where the dye takes its own light again', () => {
  const { out, sent, taken } = alone(bump(590, 120, 2), flat(0.3), 1, 2, flat(1))
  expect(Math.abs(total(out) + total(sent) - 36) / 36).toBeLessThan(2e-14)
  expect(total(taken)).toBeGreaterThan(36 - total(sent) + 1)
})
it('never gives back more photons than it took times its yield', () => {
  const { out, sent } = alone(bump(470, 90, 1), flat(0.1), 0.7, 2, flat(0.8))
  expect(total(out)).toBeLessThan(0.7 * (36 - total(sent)))
  expect(total(out)).toBeGreaterThan(0)
})
it('gives off nothing where no light is short enough to feed it', () => {
  const K = Float64Array.from(glowAbsorption(flat(1), bell))
  const red = Float64Array.from(BANDS_36, nm => nm >= 640 ? 1 : 0)
  expect(total(alone(K, flat(0.1), 0.9, 2, flat(0.9), red).out)).toBeLessThan(1e-4)
  expect(total(alone(K, flat(0.1), 0.9, 2, flat(0.9)).out)).toBeGreaterThan(1)
})
it('is cut finely enough: twice as many passes is the same as two coats', () => {
  const K = bump(470, 90, 0.6), S = flat(0.1)
  const one = alone(K, S, 0.9, 2, flat(0.8)).out
  const half = glowingCoat(filmOptics(K, S), { ...bell, quantumYield: 0.9, Kf: Array.from(K) }, 1)
  const layers = [...half.layers, ...half.layers]
  const glowers = [...half.glowers, ...half.glowers.map(glower => ({ ...glower, at: glower.at + half.layers.length }))]
  const two = solveGlow({ layers, glowers, ground: flat(0.8), inside: 0 }, flat(1)).out
  expect(Math.abs(total(two) / total(one) - 1)).toBeLessThan(0.002)
})
it('takes the absorption that feeds a glow only from below the light it gives', () => {
  const { fluorescent, K } = paintOpticsFrom({ how: 'dye-over-white', overWhite: [82, -52, 60], passes: 2, fluorescent: { peak: 522, width: 58, quantumYield: 0.85 } })
  const at = (nm: number) => BANDS_36.indexOf(nm)
  expect(fluorescent!.Kf![at(430)]! / K[at(430)]!).toBeGreaterThan(0.99)
  expect(fluorescent!.Kf![at(640)]! / K[at(640)]!).toBeLessThan(1e-6)
})
