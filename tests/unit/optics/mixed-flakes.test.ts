import { describe, expect, it } from 'vitest'
import { coatLayer, flakeCoatAt } from '../../../shared/optics/coat-layer'
import { labFromReflectance, lchFromLab } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { addLayers, type UnlikeLayer } from '../../../shared/optics/film'
import { diffuseFlake } from '../../../shared/optics/flake'
import { poissonShares } from '../../../shared/optics/flake-coat'
import { mixOptics, type PaintOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { promise } from '../../../shared/optics/stack'
import { measuredSpectrum } from '../../../shared/optics/surface'
import { flat } from './draws'

const pearl = (thickness: number, flakesPerPass = 0.5, sigma = 8) => paintOpticsFrom({ how: 'interference', thickness, oxide: 'anatase', flakesPerPass, sigma, edge: 0.06 })
const gold = pearl(75), blue = pearl(125)
const candy = paintOpticsFrom({ how: 'dye-over-white', overWhite: [50, 62, 36], passes: 2 })
const clear = paintOpticsFrom({ how: 'clear' })
const flake = paintOpticsFrom({ how: 'metallic', flakesPerPass: 0.6, sigma: 9, edge: 0.08 })
const seen = (optics: PaintOptics, passes = 2, ground = 0.02) => promise({ ground: flat(ground), coats: [{ optics, passes }], finish: 'gloss' })
const apart = (a: PaintOptics, b: PaintOptics, passes = 2) =>
  Math.max(...([15, 25, 45, 75, 110] as const).map(angle => deltaE2000(seen(a, passes).angles![angle].lab, seen(b, passes).angles![angle].lab)))

describe('two pearls in one cup', () => {
  it('are each themselves when the other has no drops', () => {
    expect(apart(mixOptics([{ optics: gold, drops: 4 }, { optics: blue, drops: 0 }]), gold)).toBeLessThan(1e-9)
    expect(apart(mixOptics([{ optics: gold, drops: 0 }, { optics: blue, drops: 4 }]), blue)).toBeLessThan(1e-9)
  })
  it('of one kind are that kind', () => {
    const mix = mixOptics([{ optics: gold, drops: 3 }, { optics: pearl(75, 0.3), drops: 2 }])
    expect(mix.flake).toMatchObject({ thickness: 75, flakesPerPass: expect.closeTo(0.42, 12) as number })
    expect(mix.flake!.kinds).toBeUndefined()
  })
  it('do not mind which went in first, nor being mixed in two steps', () => {
    const parts = [{ optics: gold, drops: 3 }, { optics: blue, drops: 2 }, { optics: clear, drops: 1 }]
    const [inOne, turned] = [mixOptics(parts), mixOptics([...parts].reverse())]
    const inTwo = mixOptics([{ optics: mixOptics(parts.slice(0, 2)), drops: 5 }, parts[2]!])
    expect(apart(inOne, turned)).toBeLessThan(1e-9)
    expect(apart(inOne, inTwo)).toBeLessThan(1e-9)
  })
  it('make no light: what is sent back and let through is at most what fell on it, at every angle', () => {
    const mix = mixOptics([{ optics: gold, drops: 1 }, { optics: flake, drops: 1 }, { optics: pearl(60), drops: 2 }])
    for (const passes of [0.2, 1, 5, 30]) {
      for (const { R, T } of [coatLayer(mix, passes), ...flakeCoatAt(mix, passes, [1, 0.9, 0.8])]) {
        expect(Math.max(...R.map((r, i) => r + T[i]!))).toBeLessThanOrEqual(1 + 1e-12)
        expect(Math.min(...R, ...T)).toBeGreaterThanOrEqual(0)
      }
    }
  })
  it('send to all sides what every order of their flakes sends, written out flake by flake', () => {
    const mean = 3
    const mix = mixOptics([{ optics: pearl(75, mean), drops: 1 }, { optics: pearl(125, mean), drops: 1 }])
    const kinds = [75, 125].map(thickness => diffuseFlake('anatase', thickness, 'exact36'))
    const exact = new Float64Array(36)
    poissonShares(mean).slice(0, 13).forEach((chance, m) => {
      for (let b = 0; b < 36; b++) exact[b]! += chance * meanOverOrders(kinds.map(kind => ({ above: kind.R[b]!, below: kind.R[b]!, T: kind.T[b]! })), m)
    })
    const lab = (R: Float64Array) => labFromReflectance(measuredSpectrum(R, 'gloss'))
    expect(deltaE2000(lab(coatLayer(mix, 1).R), lab(exact))).toBeLessThan(0.7)
  })
  it('show the commonest alone in a look that was frozen when they did', () => {
    const old = (optics: PaintOptics): PaintOptics => ({ ...optics, engineVersion: '2' })
    const mix = mixOptics([{ optics: old(gold), drops: 3 }, { optics: old(blue), drops: 2 }])
    expect(apart(mix, gold)).toBeLessThan(1e-9)
  })
  it('lie between the two on the way from gold to blue', () => {
    const face = (drops: number) => seen(mixOptics([{ optics: gold, drops: 10 - drops }, { optics: blue, drops }])).face!.lab
    const yellowness = [0, 2, 5, 8, 10].map(drops => face(drops)[2])
    yellowness.slice(1).forEach((b, i) => expect(b).toBeLessThan(yellowness[i]!))
  })
})

/** Mean reflectance of rows of m flakes, each of either kind by even chance. */
function meanOverOrders(kinds: readonly UnlikeLayer[], m: number): number {
  let sum = 0
  for (let order = 0; order < 2 ** m; order++) {
    let row: UnlikeLayer = { above: 0, below: 0, T: 1 }
    for (let i = 0; i < m; i++) row = addLayers(row, kinds[order >> i & 1]!)
    sum += row.above
  }
  return sum / 2 ** m
}

describe('a pearl in a candy', () => {
  const mix = (drops: number) => mixOptics([{ optics: pearl(50), drops: 10 - drops }, { optics: candy, drops }])
  it('is the pearl without candy and the candy without pearl', () => {
    expect(apart(mix(0), pearl(50))).toBeLessThan(1e-9)
    expect(deltaE2000(seen(mix(10), 2, 0.9).lab, seen(candy, 2, 0.9).lab)).toBeLessThan(1e-9)
  })
  it('takes the candy’s colour on its face and keeps its sheen', () => {
    const { face, flop } = seen(mix(4))
    const [, chroma, hue] = lchFromLab(face!.lab), [, , dye] = lchFromLab(seen(candy, 2, 0.9).lab)
    expect(chroma).toBeGreaterThan(lchFromLab(seen(pearl(50)).face!.lab)[1] + 4)
    expect(Math.abs((hue - dye + 540) % 360 - 180)).toBeLessThan(40)
    expect(face!.lab[0]).toBeGreaterThan(flop!.lab[0] + 15)
  })
  it('has its flakes and its dye thinned alike by clear: so many more passes make it the same', () => {
    const thinned = mixOptics([{ optics: mix(4), drops: 1 }, { optics: clear, drops: 1 }])
    expect(apart(thinned, mix(4), 2)).toBeGreaterThan(1)
    const twice = seen(thinned, 4), once = seen(mix(4), 2)
    for (const angle of [15, 45, 110] as const) expect(deltaE2000(twice.angles![angle].lab, once.angles![angle].lab)).toBeLessThan(1e-9)
  })
})

describe('flake in clear', () => {
  it('is as many passes of flake, thinner by the clear', () => {
    const thin = mixOptics([{ optics: flake, drops: 1 }, { optics: clear, drops: 3 }])
    const four = seen(thin, 4), one = seen(flake, 1)
    for (const angle of [15, 45, 110] as const) expect(deltaE2000(four.angles![angle].lab, one.angles![angle].lab)).toBeLessThan(1e-9)
  })
  it('lets more of the ground be seen the fewer drops of it there are', () => {
    const over = (drops: number) => seen(mixOptics([{ optics: flake, drops }, { optics: clear, drops: 8 - drops }]), 1, 0).angles![110].lab[0]
    const lightness = [1, 2, 4, 8].map(over)
    lightness.slice(1).forEach((L, i) => expect(L).toBeGreaterThan(lightness[i]!))
  })
})
