import { describe, expect, it } from 'vitest'
import type { Lab } from '../../../shared/optics/colorimetry'
import { filmColours } from '../../../shared/optics/coat-search'
import { deltaE2000 } from '../../../shared/optics/delta-e'
import { dropMixes, setsOf } from '../../../shared/optics/drop-mixes'
import { findCoat, findCoatNow, type FindCoatWish, type ShelfPaint } from '../../../shared/optics/find-coat'
import { sureCoat } from '../../../shared/optics/find-spread'
import { CARD_WHITE, groundFromLab } from '../../../shared/optics/known-film'
import { mixOptics, paintOpticsFrom } from '../../../shared/optics/paint-optics'
import { promise, stackReflectance } from '../../../shared/optics/stack'

const opaque = (id: string, masstone: Lab, passesToHide: number): ShelfPaint => ({ id, optics: paintOpticsFrom({ how: 'masstone-hide', masstone, passesToHide }) })
const glaze = (id: string, overWhite: Lab): ShelfPaint => ({ id, optics: paintOpticsFrom({ how: 'dye-over-white', overWhite, passes: 2, haze: 0.01 }) })
const shelf = [
  opaque('white', [96, 0, 2], 6), opaque('black', [8, 0, 0], 2.2), opaque('ochre', [58, 14, 44], 4), opaque('red', [42, 58, 36], 4),
  glaze('yellow', [84, 2, 82]), glaze('blue', [36, 6, -46]), glaze('green', [48, -34, 22]),
]
const many = [
  ...shelf, opaque('tan', [66, 8, 30], 4), opaque('umber', [27, 8, 14], 3), opaque('cream', [90, 1, 14], 6), opaque('orange', [60, 46, 58], 4.5),
  glaze('smoke', [52, 1, 5]), glaze('rose', [72, 34, 2]), glaze('brown', [44, 14, 30]), glaze('olive', [52, -6, 42]), glaze('amber', [66, 24, 70]),
]
const ground = groundFromLab(CARD_WHITE)
const wish = (target: Lab, more: Partial<FindCoatWish> = {}): FindCoatWish => ({ target, ground, shelf, finish: 'gloss', ...more })
const cup = (drops: Record<string, number>, from = shelf) =>
  mixOptics(Object.entries(drops).map(([id, count]) => ({ optics: from.find(paint => paint.id === id)!.optics, drops: count })))
const laid = (drops: Record<string, number>, passes: number, from = shelf) =>
  ({ ground, coats: [{ optics: cup(drops, from), passes }], finish: 'gloss' as const })
const partsOf = (found: { parts: { id: string, drops: number }[] }) => Object.fromEntries(found.parts.map(({ id, drops }) => [id, drops]))

describe('finding a coat', { timeout: 60_000 }, () => {
  it.each([['ochre', 1.3], ['blue', 2.6], ['black', 0.3]])('finds a paint by the colour it has after some passes: %s', (id, passes) => {
    const [best] = findCoatNow(wish(promise(laid({ [id]: 1 }, passes)).lab, { partsMost: 1 })).paints
    expect(best!.parts).toEqual([{ id, drops: 1 }])
    expect(best!.deltaE).toBeLessThan(0.1)
    expect(best!.passes / passes).toBeCloseTo(1, 1)
  })
  it('finds the drops of a mix by its colour', () => {
    const [best] = findCoatNow(wish(promise(laid({ ochre: 3, blue: 2, white: 1 }, 2)).lab)).mixes
    expect(best!.deltaE).toBeLessThan(0.1)
    expect(partsOf(best!)).toEqual({ white: 1, ochre: 3, blue: 2 })
  })
  it('misses no mix: it comes as near as trying every mix at every thickness', () => {
    const target: Lab = [50, -8, 24], few = shelf.slice(0, 5), colour = filmColours(ground, 'gloss', 'D65')
    let nearest = Infinity
    for (const size of [2, 3]) for (const set of setsOf(size, few.length)) for (const drops of dropMixes(size, 5)) {
      const { K, S } = mixOptics(set.map((p, i) => ({ optics: few[p]!.optics, drops: drops[i]! })))
      for (let passes = 0.05; passes < 12; passes *= 1.03) nearest = Math.min(nearest, deltaE2000(colour(K, S, passes), target))
    }
    expect(findCoatNow(wish(target, { shelf: few, dropsMost: 5 })).mixes[0]!.deltaE).toBeLessThan(nearest + 0.01)
  })
  it('finds a mix among sixteen paints', () => {
    const [best] = findCoatNow(wish(promise(laid({ olive: 3, rose: 1, umber: 2 }, 1.5, many)).lab, { shelf: many })).mixes
    expect(best!.deltaE).toBeLessThan(0.3)
  })
  it('gives the range that a hand keeps: thinner and thicker films are farther off', () => {
    const [best] = findCoatNow(wish(promise(laid({ ochre: 1 }, 1.5)).lab, { partsMost: 1 })).paints
    expect(best!.thin.deltaE).toBeGreaterThan(0.5)
    expect(best!.thick.deltaE).toBeGreaterThan(0.5)
    expect(best!.thin.lab[0]).toBeGreaterThan(best!.thick.lab[0])
    expect([1, 2]).toContain(best!.whole.passes)
    expect(best!.whole.deltaE).toBeGreaterThan(best!.deltaE)
  })
  it('matches under a second light only what is made of the same paints', () => {
    const stack = laid({ ochre: 3, blue: 2 }, 2)
    const found = findCoatNow(wish(promise(stack).lab, { targetReflectance: stackReflectance(stack).measured, dropsMost: 5 })).mixes
    expect(found[0]!.second.deltaE).toBeLessThan(0.2)
    expect(Math.max(...found.map(each => each.second.deltaE))).toBeGreaterThan(0.3)
  })
  it('sprays a fluorescent by itself, and takes its glow into account', () => {
    const orange: ShelfPaint = { id: 'orange', optics: paintOpticsFrom({ how: 'dye-over-white', overWhite: [66, 60, 72], passes: 2, haze: 0.012, fluorescent: { peak: 603, width: 56, quantumYield: 0.93 } }) }
    const found = findCoatNow(wish(promise({ ground, coats: [{ optics: orange.optics, passes: 1.2 }], finish: 'gloss' }).lab, { shelf: [...shelf, orange], dropsMost: 3 }))
    expect(found.paints[0]!.parts[0]!.id).toBe('orange')
    expect(found.paints[0]!.deltaE).toBeLessThan(0.1)
    expect(found.mixes.every(mix => mix.parts.every(part => part.id !== 'orange'))).toBe(true)
  })
  it('can be stopped between slices, and tells how far it has come', () => {
    const search = findCoat(wish([50, 10, 20]))
    const seen: number[] = []
    for (let step = search.next(); !step.done; step = search.next()) seen.push(step.value.done)
    expect(seen).toEqual([...seen].sort((a, b) => a - b))
    expect(seen.length).toBeGreaterThan(8)
    const stopped = findCoat(wish([50, 10, 20]))
    stopped.next()
    stopped.return({ paints: [], mixes: [] })
    expect(stopped.next().done).toBe(true)
  })
  it('has the nearest so far to give at every stop, nearer and nearer', () => {
    const search = findCoat(wish([50, 10, 20]))
    const nearest: number[] = []
    let last = -1
    for (let step = search.next(); !step.done; step = search.next()) {
      const { found, soFar } = step.value
      if (found === last) continue
      last = found
      const { paints, mixes } = soFar()
      nearest.push(Math.min(...[...paints, ...mixes].map(({ deltaE }) => deltaE)))
    }
    expect(nearest.length).toBeGreaterThan(2)
    expect(nearest).toEqual([...nearest].sort((a, b) => b - a))
    expect(nearest.at(-1)!).toBeLessThan(nearest[0]!)
  })
  it('says how sure it is over the ground it is laid on, whose doubts it shares', () => {
    const target = promise(laid({ blue: 1 }, 2)).lab
    const below = [{ optics: shelf[2]!.optics, passes: 1 }]
    const alone = wish(target, { wholePasses: true, partsMost: 1 }), over = { ...alone, below }
    const found = (where: FindCoatWish) => findCoatNow(where).paints.find(({ parts }) => parts[0]!.id === 'blue')!
    const sure = (where: FindCoatWish, numbers?: number[]) => sureCoat(where, found(where), numbers).spread
    expect(sure(over, [3, 4]).typical).toBeGreaterThan(0.5)
    expect(sure(over, [3, 4]).causes.some(({ coats }) => coats.includes(0))).toBe(true)
    expect(sure(alone).causes.every(({ coats }) => coats.every(coat => coat === 0))).toBe(true)
    // A hand that lays a fifth goes over it five times: the same film, as sure.
    expect(sure({ ...alone, laid: 0.2 }).typical).toBeCloseTo(sure(alone).typical, 9)
  })
  it('has each set of paints once, nearest first, and no clears', () => {
    const clear: ShelfPaint = { id: 'clear', optics: paintOpticsFrom({ how: 'clear' }) }
    const { mixes, paints } = findCoatNow(wish([60, -10, 30], { shelf: [clear, ...shelf], answers: 8, dropsMost: 4 }))
    expect(new Set(mixes.map(mix => mix.parts.map(part => part.id).join())).size).toBe(8)
    expect(mixes.map(mix => mix.deltaE)).toEqual(mixes.map(mix => mix.deltaE).sort((a, b) => a - b))
    expect([...mixes, ...paints].some(found => found.parts.some(part => part.id === 'clear'))).toBe(false)
  })
  it('refuses limits that make no sense', () => {
    expect(() => findCoatNow(wish([50, 0, 0], { dropsMost: 40 }))).toThrow(/drops/)
    expect(() => findCoatNow(wish([50, 0, 0], { ground: new Float64Array(35) }))).toThrow(/36 bands/)
  })
})
it('counts every cup once', () => {
  expect(dropMixes(2, 4)).toEqual([[1, 1], [1, 2], [2, 1], [1, 3], [3, 1]])
  expect(setsOf(3, 12)).toHaveLength(220)
})
