import fc from 'fast-check'
import { expect, it } from 'vitest'
import { lchFromLab } from '../../../shared/optics/colorimetry'
import { flakeCoatAt } from '../../../shared/optics/coat-layer'
import { diffuseFlake, singleFlake } from '../../../shared/optics/flake'
import { flakeCoat, poissonShares } from '../../../shared/optics/flake-coat'
import { FLAKE_TABLE_COSINES, flakeTable } from '../../../shared/optics/flake-table'
import { interferenceColour, thicknessForColour } from '../../../shared/optics/known-flake'
import { paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { refractiveIndex } from '../../../shared/optics/refractive-index'
import { thinFilm } from '../../../shared/optics/thin-film'
import { coefficient, flat, magnitude } from './draws'

const pearl = paintOpticsFrom({ how: 'interference', thickness: 125, oxide: 'anatase', flakesPerPass: 0.4, sigma: 8, edge: 0.06 })
const none = flat(0)

it('loses no light in a flake that does not absorb', () => {
  const { R, T } = singleFlake('rutile', 90, [1, 0.8, 0.4], 'exact36')
  R.forEach((value, i) => expect(value + T[i]!).toBeCloseTo(1, 12))
})
it('averages mica of uncertain thickness as adding up many thicknesses does', () => {
  const bell = (reach: number, count: number) => Array.from({ length: count }, (_, i) => reach * (2 * i / (count - 1) - 1))
    .map(step => ({ step, height: Math.exp(-step * step / 2) }))
  const mean = (angle: number) => {
    let sum = 0, whole = 0
    for (const oxide of bell(2, 5)) for (const mica of bell(7, 401)) {
      const coat = { ...refractiveIndex('hematite', 580), d: 95 * (1 + 0.05 * oxide.step) }
      const films = [coat, { n: 1.59, k: 0, d: 350 + 90 * mica.step }, coat]
      // A bell reaches below no thickness at all by one part in twenty thousand; such mica is left out here.
      if (films[1]!.d < 0) continue
      sum += oxide.height * mica.height * thinFilm({ wavelength: 580, angle, n0: 1.5, films, nExit: 1.5 }).R
      whole += oxide.height * mica.height
    }
    return sum / whole
  }
  const { R } = singleFlake('hematite', 95, [1, Math.cos(Math.PI / 5)], 'exact36')
  expect(R[20]).toBeCloseTo(mean(0), 4)
  expect(R[36 + 20]).toBeCloseTo(mean(36), 4)
})
it('lets hematite take light, and aluminium let none through', () => {
  const hematite = singleFlake('hematite', 90, [1], 'exact36')
  expect(hematite.R[5]! + hematite.T[5]!).toBeLessThan(0.8)
  expect(Math.max(...singleFlake('aluminium', 80, [1], 'exact36').T)).toBeLessThan(1e-3)
})

// Colour by oxide thickness, G. Pfaff, P. Reynders, Chem. Rev. 99 (1999) 1963–1981: silver, gold, red, blue, green (from memory)
it.each([[50, 'silver', -1, -1], [75, 'gold', 70, 110], [94, 'red', 0, 45], [115, 'lilac to blue', 270, 330], [125, 'blue', 240, 300], [158, 'green', 120, 180]])(
  'turns anatase of %i nm %s', (thickness, _, from, to) => {
    const [, C, h] = lchFromLab(interferenceColour('anatase', thickness as number))
    if (Number(from) < 0) expect(C).toBeLessThan(8)
    else expect(h >= Number(from) && h <= Number(to)).toBe(true)
  })
it('picks the thickness whose face has the hue that was asked for', () => {
  for (const hue of [20, 60, 90, 140, 230, 270, 310]) {
    const thickness = thicknessForColour([60, 40 * Math.cos(hue * Math.PI / 180), 40 * Math.sin(hue * Math.PI / 180)], 'anatase')
    const [, , face] = lchFromLab(interferenceColour('anatase', thickness))
    expect(Math.abs((face - hue + 540) % 360 - 180)).toBeLessThan(6)
  }
})
it('makes a silver pearl when a grey is asked for', () => {
  expect(lchFromLab(interferenceColour('anatase', thicknessForColour([80, 1, 2], 'anatase')))[1]).toBeLessThan(8)
})
it('lets opaque flakes leave gaps as chance has it', () => {
  fc.assert(fc.property(magnitude(-2, 1), (mean) => {
    const mirror = { R: flat(1), T: flat(0) }
    const { R, T } = flakeCoat(mirror, mean, none, none, 1)
    expect(T[0]).toBeCloseTo(Math.exp(-mean), 10)
    expect(R[0]).toBeCloseTo(1 - Math.exp(-mean), 10)
  }))
})
it('shares out chance whole', () => {
  fc.assert(fc.property(magnitude(-3, 2), (mean) => {
    const shares = poissonShares(mean)
    expect(shares.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 12)
    expect(shares.reduce((sum, share, m) => sum + m * share, 0) / mean).toBeCloseTo(1, 8)
  }))
})
it('is the bare binder when there are no flakes, and creates no light with them', () => {
  const flake = diffuseFlake('anatase', 125, 'exact36')
  fc.assert(fc.property(coefficient, coefficient, magnitude(-2, 0.7), (K, S, passes) => {
    const { R, T } = flakeCoat(flake, 0.4, flat(K), flat(S), passes)
    for (let b = 0; b < 36; b++) expect(R[b]! + T[b]!).toBeLessThanOrEqual(1 + 1e-12)
    const bare = flakeCoat(flake, 0, flat(K), flat(0), passes)
    expect(bare.T[0]).toBeCloseTo(Math.exp(-K * passes), 12)
  }), { numRuns: 25 })
})
it('does not care whether the binder is counted as clear or as nearly clear', () => {
  const flake = diffuseFlake('anatase', 125, 'exact36')
  const clear = flakeCoat(flake, 0.4, none, none, 3)
  const nearly = flakeCoat(flake, 0.4, flat(1e-12), none, 3)
  clear.R.forEach((value, b) => expect(nearly.R[b]).toBeCloseTo(value, 10))
})
it('tabulates for pictures what it works out in full', () => {
  const table = flakeTable(pearl, 2)
  const full = flakeCoatAt(pearl, 2, FLAKE_TABLE_COSINES, 'picture16')
  full.forEach((layer, row) => layer.R.forEach((value, b) => expect(table.mirrored[16 * row + b]).toBe(value)))
  expect(table.mirrored).toHaveLength(96)
})
it('refuses a table for a paint without flakes', () => {
  expect(() => flakeTable(paintOpticsFrom({ how: 'clear' }), 1)).toThrow(RangeError)
})
