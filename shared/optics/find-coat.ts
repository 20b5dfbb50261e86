import { assertBands, assertWithin, type Spectrum } from './bands'
import { bestPasses, type FilmColour, filmColours } from './coat-search'
import { type Lab, labFromReflectance, type Light } from './colorimetry'
import { deltaE2000 } from './delta-e'
import { dropMixes, setsOf } from './drop-mixes'
import { glowOf } from './fluorescence'
import { mixOptics } from './mix-optics'
import type { PaintOptics } from './paint-optics'
import { type Film, nearestUncut } from './screen-mixes'
import { spectrumFromLab } from './spectrum-from-colour'
import { promise } from './stack'
import type { Finish } from './surface'

/** A paint to choose from. */
export interface ShelfPaint { id: string, optics: PaintOptics }

/** What a coat is looked for. */
export interface FindCoatWish {
  /** The colour it should have, under `light`. */
  target: Lab
  /** The same as a reflectance as measured, where it was; a calm spectrum of the colour is taken for the second light otherwise. */
  targetReflectance?: Spectrum
  /** Reflectance inside what the coat will lie on, 36 bands. */
  ground: Spectrum
  shelf: readonly ShelfPaint[]
  finish: Finish
  light?: Light
  /** A second light to judge under; a filament lamp when left out. */
  second?: Light
  /** Most passes, drops in the cup, paints in the cup (1…3), and answers of each kind. */
  passesMost?: number
  dropsMost?: number
  partsMost?: number
  answers?: number
}

/** A coat that comes near. */
export interface FoundCoat {
  parts: { id: string, drops: number }[]
  /** Passes that come nearest, and the nearest in whole passes. */
  passes: number
  lab: Lab
  deltaE: number
  whole: { passes: number, deltaE: number }
  /** With the film 15 % thinner and thicker: what a hand can promise. */
  thin: { lab: Lab, deltaE: number }
  thick: { lab: Lab, deltaE: number }
  /** Under the second light: its colour, and its distance from the colour looked for, CIEDE2000. */
  second: { light: Light, lab: Lab, deltaE: number }
}

/** Single paints and drop mixes, nearest first; mixes of different paints only. */
export interface FoundCoats { paints: FoundCoat[], mixes: FoundCoat[] }

/** How far a search has come, in shares of 1. */
export interface FindProgress { done: number }

/** Film per pass varies by so much from hand to hand and day to day: the largest error of a promise. Common practice. */
const FILM_SPREAD = 0.15
/** Up to so many paints every mix is tried. Above, sets of paints are screened first and so many of the best are tried. */
const ALL_TRIED_UP_TO = 12, SETS_KEPT = 150
/** Work between two rests, in films: some milliseconds. */
const SLICE = 400
/** A mix whose seeds are farther off than the best so far by this is not looked at further, ΔE00. */
const HOPELESS = 15

/**
 * Looks for the coat that brings a ground nearest to a colour: each paint by itself, then drop mixes of two and three.
 *
 * Rests between slices of work, so that a worker can stop it. Mixes are of film paints: fluorescents lose their glow to other
 * paints and pearls their look, so these are tried by themselves. Clears are left out: they only thin. Whether two paints go into
 * one cup at all (water with solvent) is the caller's to know: give a shelf that does.
 *
 * @throws {RangeError} when the ground or a limit is out of range
 */
export function* findCoat(wish: FindCoatWish): Generator<FindProgress, FoundCoats, undefined> {
  const search = prepare(wish)
  const { shelf, answers } = search
  const paints: FoundCoat[] = []
  for (const [i, paint] of shelf.entries()) {
    paints.push(single(search, paint))
    yield { done: 0.1 * (i + 1) / shelf.length }
  }
  paints.sort(nearestFirst)
  const mixes = search.partsMost > 1 ? yield* bestMixes(search) : []
  return { paints: paints.slice(0, answers), mixes: mixes.slice(0, answers) }
}

/** `findCoat` without a rest. */
export function findCoatNow(wish: FindCoatWish): FoundCoats {
  const search = findCoat(wish)
  for (;;) {
    const step = search.next()
    if (step.done) return step.value
  }
}

interface Search extends Required<Omit<FindCoatWish, 'targetReflectance'>> {
  targetUnderSecond: Lab
  colour: FilmColour
  colourUnderSecond: FilmColour
}

function prepare({ target, targetReflectance, ground, shelf, finish, light = 'D65', second = 'A', passesMost = 12, dropsMost = 8, partsMost = 3, answers = 3 }: FindCoatWish): Search {
  assertBands('findCoat', 36, ground)
  assertWithin('findCoat', 'the ground', 0, 1, ground)
  assertWithin('findCoat', 'the most passes', 0.1, 100, [passesMost])
  assertWithin('findCoat', 'the most drops', 1, 12, [dropsMost])
  assertWithin('findCoat', 'the most paints', 1, 3, [partsMost])
  const reflectance = targetReflectance ?? spectrumFromLab(target, light).reflectance
  return {
    target, ground, shelf: shelf.filter(({ optics }) => optics.kind !== 'clear'), finish, light, second, passesMost, dropsMost, partsMost, answers,
    targetUnderSecond: labFromReflectance(reflectance, second),
    colour: filmColours(ground, finish, light), colourUnderSecond: filmColours(ground, finish, second),
  }
}

/** Paints that only need their K and S to be known. */
function isFilm({ optics }: ShelfPaint): boolean {
  return optics.flake === undefined && glowOf(optics) === undefined
}

function single(search: Search, paint: ShelfPaint): FoundCoat {
  const under = (light: Light) => isFilm(paint)
    ? (passes: number) => (light === search.light ? search.colour : search.colourUnderSecond)(paint.optics.K, paint.optics.S, passes)
    : (passes: number) => promise({ ground: search.ground, coats: [{ optics: paint.optics, passes }], finish: search.finish }, light).lab
  return described(search, [{ id: paint.id, drops: 1 }], under(search.light), under(search.second))
}

function described(search: Search, parts: FoundCoat['parts'], colourAt: (passes: number) => Lab, underSecond: (passes: number) => Lab): FoundCoat {
  const { target, passesMost, second, targetUnderSecond } = search
  const { passes } = bestPasses(colourAt, target, passesMost)
  const at = (amount: number) => {
    const lab = colourAt(amount)
    return { lab, deltaE: deltaE2000(lab, target) }
  }
  const whole = [Math.floor(passes), Math.ceil(passes)].filter(count => count >= 1 && count <= Math.max(1, passesMost)).map(count => ({ passes: count, deltaE: at(count).deltaE }))
  const lab = underSecond(passes)
  return {
    parts, passes, ...at(passes),
    whole: whole.reduce((best, each) => each.deltaE < best.deltaE ? each : best, whole[0] ?? { passes: 1, deltaE: at(1).deltaE }),
    thin: at(passes * (1 - FILM_SPREAD)), thick: at(passes * (1 + FILM_SPREAD)),
    second: { light: second, lab, deltaE: deltaE2000(lab, targetUnderSecond) },
  }
}

/** The best mix of each set of paints, nearest first. */
function* bestMixes(search: Search): Generator<FindProgress, FoundCoat[], undefined> {
  const films = search.shelf.filter(isFilm)
  const sets = yield* setsToTry(search, films)
  const nearest: { set: readonly ShelfPaint[], drops: readonly number[], deltaE: number }[] = []
  let best = Infinity, work = 0
  const K = new Float64Array(36), S = new Float64Array(36)
  const mixesOf = new Map([2, 3].map(size => [size, dropMixes(size, search.dropsMost)]))
  for (const [i, set] of sets.entries()) {
    let here: { drops: readonly number[], deltaE: number } | undefined
    for (const drops of mixesOf.get(set.length) ?? []) {
      mixInto(set, drops, K, S)
      const { deltaE } = bestPasses(passes => search.colour(K, S, passes), search.target, search.passesMost, best + HOPELESS)
      if (!here || deltaE < here.deltaE) here = { drops, deltaE }
      best = Math.min(best, deltaE)
      if (++work % SLICE === 0) yield { done: 0.4 + 0.6 * i / sets.length }
    }
    if (here) nearest.push({ set, ...here })
  }
  return nearest.sort(nearestFirst).slice(0, search.answers).map(({ set, drops }) => {
    const { K, S } = mixOptics(set.map(({ optics }, i) => ({ optics, drops: drops[i]! })))
    const parts = set.map(({ id }, i) => ({ id, drops: drops[i]! }))
    return described(search, parts, passes => search.colour(K, S, passes), passes => search.colourUnderSecond(K, S, passes))
  })
}

/** Sets of two and three paints: all of them, or those that come nearest when drops could be cut. */
function* setsToTry(search: Search, films: readonly ShelfPaint[]): Generator<FindProgress, (readonly ShelfPaint[])[], undefined> {
  const sizes = [2, 3].filter(size => size <= search.partsMost)
  const all = sizes.flatMap(size => setsOf(size, films.length)).map(set => set.map(i => films[i]!))
  if (films.length <= ALL_TRIED_UP_TO) return all
  const screened: { set: readonly ShelfPaint[], deltaE: number }[] = []
  for (const [i, set] of all.entries()) {
    screened.push({ set, deltaE: nearestUncut(set.map(({ optics }): Film => optics), search.colour, search.target, search.passesMost) })
    if (i % (SLICE / 8) === 0) yield { done: 0.1 + 0.3 * i / all.length }
  }
  return screened.sort(nearestFirst).slice(0, SETS_KEPT).map(({ set }) => set)
}

function mixInto(set: readonly ShelfPaint[], drops: readonly number[], K: Float64Array, S: Float64Array): void {
  const total = drops.reduce((sum, count) => sum + count, 0)
  K.fill(0)
  S.fill(0)
  set.forEach(({ optics }, p) => {
    const share = drops[p]! / total
    for (let i = 0; i < 36; i++) {
      K[i]! += share * optics.K[i]!
      S[i]! += share * optics.S[i]!
    }
  })
}

function nearestFirst(a: { deltaE: number }, b: { deltaE: number }): number {
  return a.deltaE - b.deltaE
}
