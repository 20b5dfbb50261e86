import { describe, expect, it } from 'vitest'
import { type Lab, labFromXyz, xyzFromReflectance } from '../../../shared/optics/colorimetry'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { dropMixes, setsOf } from '../../../shared/optics/drop-mixes'
import { labFromSums, rangeBound, rangeWeights } from '../../../shared/optics/find-bound'
import { findCoatNow, type FindCoatWish, type ShelfPaint } from '../../../shared/optics/find-coat'
import { CARD_BLACK, CARD_WHITE, groundFromLab } from '../../../shared/optics/known-film'
import { weightsFor } from '../../../shared/optics/lights'
import { filmOptics, mixOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { type Coat, promise } from '../../../shared/optics/stack'

/** A sequence without chance: the same every time. */
function sequence(seed: number): () => number {
  let state = seed
  return () => (state = (state * 16807) % 2147483647) / 2147483647
}

/** Paints as no maker mixes them: every band by itself. */
function wildShelf(count: number, seed: number): ShelfPaint[] {
  const next = sequence(seed)
  return Array.from({ length: count }, (_, i) => ({
    id: `wild ${i}`,
    optics: filmOptics(Array.from({ length: 36 }, () => 2 * next() ** 4), Array.from({ length: 36 }, () => (i % 3 === 0 ? 0 : next() ** 2))),
  }))
}

const GROUNDS = [groundFromLab(CARD_WHITE), groundFromLab(CARD_BLACK), groundFromLab([55, 10, 40])]
const TARGETS: Lab[] = [[52, -8, 24], [34, 6, -34], [44, 52, 24], [20, 1, -2], [82, 3, 52]]

/** Every cup at every number of whole passes, by the engine's own promise; the nearest of each set. */
function bruteForce({ target, ground, below = [], above = [], shelf, finish, passesMost = 12, dropsMost = 8, partsMost = 3, laid = 1 }: FindCoatWish): number[] {
  const sizes = [2, 3].filter(size => size <= partsMost)
  const bySet = sizes.flatMap(size => setsOf(size, shelf.length).map(set => Math.min(...dropMixes(size, dropsMost).flatMap((drops) => {
    const optics = mixOptics(set.map((p, i) => ({ optics: shelf[p]!.optics, drops: drops[i]! })))
    return Array.from({ length: passesMost }, (_, n) => deltaE2000(promise({ ground, coats: [...below, { optics, passes: (n + 1) * laid }, ...above], finish }).lab, target))
  }))))
  return bySet.sort((a, b) => a - b)
}

describe('the nearest cup', () => {
  it.each(TARGETS.map((target, i) => ({ target, ground: GROUNDS[i % 3]!, seed: 11 + i })))('is the same as when every cup is tried: $target', ({ target, ground, seed }) => {
    const wish: FindCoatWish = { target, ground, shelf: wildShelf(5, seed), finish: 'matt', wholePasses: true, passesMost: 6, dropsMost: 5 }
    const found = findCoatNow(wish).mixes.map(mix => mix.deltaE)
    bruteForce(wish).slice(0, 3).forEach((deltaE, i) => expect(found[i]).toBeCloseTo(deltaE, 6))
  })

  it('is the same over a silver pearl and under a yellowed clear, at three quarters of a pass', () => {
    const silver: Coat = { optics: paintOpticsFrom({ how: 'interference', oxide: 'anatase', thickness: 50, flakesPerPass: 0.6, sigma: 9, edge: 0.06 }), passes: 3 }
    const clear: Coat = { optics: paintOpticsFrom({ how: 'clear', yellowing: 0.05 }), passes: 2 }
    const wish: FindCoatWish = { target: [48, 30, 38], ground: GROUNDS[1]!, below: [silver], above: [clear], shelf: wildShelf(4, 5), finish: 'gloss', wholePasses: true, passesMost: 5, dropsMost: 4, laid: 0.75 }
    const found = findCoatNow(wish).mixes.map(mix => mix.deltaE)
    bruteForce(wish).slice(0, 3).forEach((deltaE, i) => expect(found[i]).toBeCloseTo(deltaE, 6))
  })

  it('is within 0.02 of the best when any film may be laid', () => {
    for (const [i, target] of TARGETS.entries()) {
      const shelf = wildShelf(4, 31 + i), ground = GROUNDS[i % 3]!
      let nearest = Infinity
      for (const size of [2, 3]) for (const set of setsOf(size, shelf.length)) for (const drops of dropMixes(size, 3)) {
        const optics = mixOptics(set.map((p, j) => ({ optics: shelf[p]!.optics, drops: drops[j]! })))
        for (let passes = 0.01; passes <= 12; passes *= 1.02) nearest = Math.min(nearest, deltaE2000(promise({ ground, coats: [{ optics, passes }], finish: 'gloss' }).lab, target))
      }
      expect(findCoatNow({ target, ground, shelf, finish: 'gloss', dropsMost: 3 }).mixes[0]!.deltaE).toBeLessThan(nearest + 0.02)
    }
  })

  it('never holds paints that may not share one', () => {
    const shelf = wildShelf(6, 3).map((paint, i) => ({ ...paint, cup: i < 3 ? 'water' : 'solvent' }))
    const { mixes } = findCoatNow({ target: [50, 0, 20], ground: GROUNDS[0]!, shelf, finish: 'gloss', wholePasses: true, dropsMost: 4, answers: 12 })
    const cupOf = (id: string) => shelf.find(paint => paint.id === id)!.cup
    expect(mixes.length).toBe(8)
    expect(mixes.every(mix => new Set(mix.parts.map(part => cupOf(part.id))).size === 1)).toBe(true)
  })

  it('is not looked for over a fluorescent, where a film takes light that something gives off', () => {
    const glow: Coat = { optics: paintOpticsFrom({ how: 'dye-over-white', overWhite: [66, 60, 72], passes: 2, haze: 0.012, fluorescent: { peak: 603, width: 56, quantumYield: 0.93 } }), passes: 2 }
    const shelf = wildShelf(3, 9)
    const found = findCoatNow({ target: [60, 50, 60], ground: GROUNDS[0]!, below: [glow], shelf, finish: 'gloss', wholePasses: true, passesMost: 3 })
    expect(found.mixes).toEqual([])
    const by = shelf.flatMap(({ optics }) => [1, 2, 3].map(passes => deltaE2000(promise({ ground: GROUNDS[0]!, coats: [glow, { optics, passes }], finish: 'gloss' }).lab, [60, 50, 60])))
    expect(found.paints[0]!.deltaE).toBeCloseTo(Math.min(...by), 6)
  })
})

describe('a range of colours', () => {
  const next = sequence(77)
  const weights = rangeWeights(weightsFor('D65'))
  const sumsOf = (spectrum: ArrayLike<number>) => [weights.y, weights.u, weights.v].map(each => each.reduce((sum, w, b) => sum + w * spectrum[b]!, 0)) as [number, number, number]

  it('has the Lab of its sums', () => {
    const spectrum = Array.from({ length: 36 }, () => next())
    labFromXyz(xyzFromReflectance(spectrum)).forEach((value, i) => expect(labFromSums(...sumsOf(spectrum))[i]).toBeCloseTo(value, 9))
  })

  it('is never said to be farther than any colour in it, wherever target and range lie', () => {
    let tight = 0
    for (let round = 0; round < 3000; round++) {
      const tilt = next(), level = next() ** 2, wide = next() ** 3
      const low = Array.from({ length: 36 }, (_, b) => level * (0.15 + 0.85 * Math.abs(Math.sin(6 * tilt + b / (4 + 12 * tilt)))))
      const high = low.map(value => Math.min(1, value + wide * next()))
      const target: Lab = [100 * next(), 160 * next() - 80, 160 * next() - 80]
      const [a, z] = [sumsOf(low), sumsOf(high)]
      const half = [weights.y, weights.u, weights.v].map(each => each.reduce((sum, w, b) => sum + Math.abs(w) * (high[b]! - low[b]!) / 2, 0))
      const said = rangeBound(target).least({ y: (a[0] + z[0]) / 2, yHalf: half[0]!, u: (a[1] + z[1]) / 2, uHalf: half[1]!, v: (a[2] + z[2]) / 2, vHalf: half[2]! }, Infinity)
      for (let inside = 0; inside < 6; inside++) {
        const at = low.map((value, b) => value + (inside === 0 ? 0 : inside === 1 ? 1 : Math.round(next() * 4) / 4) * (high[b]! - value))
        const distance = deltaE2000(labFromSums(...sumsOf(at)), target)
        expect(said).toBeLessThanOrEqual(distance)
        if (said > 0.4 * distance) tight++
      }
    }
    // A bound of 0 would be right, and of no use.
    expect(tight).toBeGreaterThan(3000)
  })
})

describe('what physics says', () => {
  const glaze = (id: string, overWhite: Lab): ShelfPaint => ({ id, optics: paintOpticsFrom({ how: 'dye-over-white', overWhite, passes: 2, haze: 0.005 }) })
  const [yellow, blue, red] = [glaze('yellow', [86, -4, 80]), glaze('blue', [48, -22, -38]), glaze('red', [46, 58, 30])]

  it('finds a known mix again', () => {
    const optics = mixOptics([{ optics: yellow.optics, drops: 3 }, { optics: red.optics, drops: 2 }])
    const target = promise({ ground: GROUNDS[0]!, coats: [{ optics, passes: 2 }], finish: 'matt' }).lab
    const [best] = findCoatNow({ target, ground: GROUNDS[0]!, shelf: [yellow, blue, red], finish: 'matt', wholePasses: true }).mixes
    expect(best!.parts).toEqual([{ id: 'yellow', drops: 3 }, { id: 'red', drops: 2 }])
    expect(best!.passes).toBe(2)
    expect(best!.deltaE).toBeLessThan(1e-6)
  })

  it('makes green of a yellow and a greenish blue over white, and not over black, where clear dyes have nothing to colour', () => {
    const wish = (ground: Float64Array): FindCoatWish => ({ target: [50, -38, 22], ground, shelf: [yellow, blue, red], finish: 'gloss', wholePasses: true })
    const [overWhite] = findCoatNow(wish(GROUNDS[0]!)).mixes
    expect(overWhite!.parts.map(part => part.id)).toEqual(['yellow', 'blue'])
    expect(overWhite!.lab[1]).toBeLessThan(-20)
    expect(findCoatNow(wish(GROUNDS[1]!)).mixes[0]!.deltaE).toBeGreaterThan(25)
  })
})
