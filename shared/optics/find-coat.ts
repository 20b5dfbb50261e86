import { assertWithin, type Spectrum } from './bands'
import { bestPasses, nearestAround } from './coat-search'
import { type Lab, labFromReflectance, type Light } from './colorimetry'
import { deltaE2000 } from './delta-e'
import { type Cup, nearestCups } from './find-cups'
import { filmSearch, type FilmSearch, type PassesAllowed, type Reached } from './find-film'
import { type FindScene, findScene, type SceneWish } from './find-scene'
import { glowOf } from './fluorescence'
import { mixOptics } from './mix-optics'
import type { PaintOptics } from './paint-optics'
import { spectrumFromLab } from './spectrum-from-colour'
import { promise } from './stack'

/** A paint to choose from. Paints of different cups never go into one; those that name none share. */
export interface ShelfPaint { id: string, optics: PaintOptics, cup?: string }

/** What a coat is looked for. */
export interface FindCoatWish extends SceneWish {
  /** The colour it should have, under `light`. */
  target: Lab
  /** The same as a reflectance as measured, where it was; a calm spectrum of the colour is taken for the second light otherwise. */
  targetReflectance?: Spectrum
  shelf: readonly ShelfPaint[]
  light?: Light
  /** A second light to judge under; a filament lamp when left out. */
  second?: Light
  /** Most passes, drops in the cup, paints in the cup (1…3), and answers of each kind. */
  passesMost?: number
  dropsMost?: number
  partsMost?: number
  answers?: number
  /** Only whole passes, as they are sprayed; any amount of film otherwise. */
  wholePasses?: boolean
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

/** How far a search has come. */
export interface FindProgress {
  /** In shares of 1. */
  done: number
  /** The nearest so far, for whoever stops here; worked out when asked for. */
  soFar: () => FoundCoats
  /** Another number when something nearer was found. */
  found: number
}

/** Film per pass varies by so much from hand to hand and day to day: the largest error of a promise. Common practice. */
export const FILM_SPREAD = 0.15

/**
 * Looks for the coat that brings a ground nearest to a colour: each paint by itself, then drop mixes of two and three.
 *
 * Every cup of whole drops is answered for, none is guessed at: see `nearestCups` and `filmSearch`. Rests between slices of
 * work, so that a worker can stop it. Mixes are of film paints: fluorescents lose their glow to other paints and pearls their
 * look, so these are tried by themselves; over a ground that glows no mixes are tried. Clears are left out: they only thin.
 *
 * @throws {RangeError} when the ground or a limit is out of range
 */
export function* findCoat(wish: FindCoatWish): Generator<FindProgress, FoundCoats, undefined> {
  const search = prepare(wish)
  const { shelf, answers } = search
  const ranked: { paint: ShelfPaint, reached: Reached }[] = []
  const paintsNow = () => [...ranked].sort((a, b) => a.reached.deltaE - b.reached.deltaE).slice(0, answers)
    .map(({ paint, reached }) => described(search, [{ id: paint.id, drops: 1 }], paint.optics, reached))
  for (const [i, paint] of shelf.entries()) {
    ranked.push({ paint, reached: single(search, paint) })
    if (!isFilm(paint)) yield { done: 0.1 * (i + 1) / shelf.length, soFar: () => ({ paints: paintsNow(), mixes: [] }), found: 0 }
  }
  const paints = paintsNow()
  const mixesOf = (cups: readonly Cup<ShelfPaint>[]) => cups.map(cup => described(search, partsOf(cup), mixedIn(cup), cup.reached))
  yield { done: 0.1, soFar: () => ({ paints, mixes: [] }), found: 0 }
  const films = search.scene.hasGlow || search.partsMost === 1 ? [] : shelf.filter(isFilm)
  const cups = nearestCups(films, search.films, search)
  for (;;) {
    const step = cups.next()
    if (step.done) return { paints, mixes: mixesOf(step.value) }
    const { done, found, nearest } = step.value
    yield { done, found, soFar: () => ({ paints, mixes: mixesOf(nearest()) }) }
  }
}

/** `findCoat` without a rest. */
export function findCoatNow(wish: FindCoatWish): FoundCoats {
  const search = findCoat(wish)
  for (;;) {
    const step = search.next()
    if (step.done) return step.value
  }
}

interface Search {
  scene: FindScene
  films: FilmSearch
  shelf: readonly ShelfPaint[]
  target: Lab
  targetUnderSecond: Lab
  light: Light
  second: Light
  passes: PassesAllowed
  dropsMost: number
  partsMost: number
  answers: number
}

function prepare({ target, targetReflectance, shelf, light = 'D65', second = 'A', passesMost = 12, dropsMost = 8, partsMost = 3, answers = 3, wholePasses = false, ...scene }: FindCoatWish): Search {
  assertWithin('findCoat', 'the most passes', 0.1, 100, [passesMost])
  assertWithin('findCoat', 'the most drops', 1, 12, [dropsMost])
  assertWithin('findCoat', 'the most paints', 1, 3, [partsMost])
  const reflectance = targetReflectance ?? spectrumFromLab(target, light).reflectance
  const place = findScene(scene)
  const passes = { most: wholePasses ? Math.max(1, Math.floor(passesMost)) : passesMost, whole: wholePasses }
  return {
    scene: place, target, light, second, passes, dropsMost, partsMost, answers,
    shelf: shelf.filter(({ optics }) => optics.kind !== 'clear'),
    films: filmSearch(place, target, light, passes),
    targetUnderSecond: labFromReflectance(reflectance, second),
  }
}

/** Paints that only need their K and S to be known. */
function isFilm({ optics }: ShelfPaint): boolean {
  return optics.flake === undefined && glowOf(optics) === undefined
}

function single(search: Search, paint: ShelfPaint): Reached {
  if (isFilm(paint) && !search.scene.hasGlow) return search.films.nearest(paint.optics.K, paint.optics.S, Infinity) ?? { passes: search.passes.most, deltaE: Infinity }
  const colourAt = colourOf(search, paint.optics, search.light)
  if (!search.passes.whole) return bestPasses(colourAt, search.target, search.passes.most)
  const all = Array.from({ length: search.passes.most }, (_, i) => ({ passes: i + 1, deltaE: deltaE2000(colourAt(i + 1), search.target) }))
  return all.reduce((best, each) => each.deltaE < best.deltaE ? each : best)
}

/** What the engine promises after some passes. */
function colourOf({ scene }: Search, optics: PaintOptics, light: Light): (passes: number) => Lab {
  const { below, above, finish, laid, ground } = scene.wish
  // What only sends light back to all sides below may be one ground.
  const isPlain = !scene.hasShine && !scene.hasGlow
  return passes => promise({
    ground: isPlain ? scene.ground : ground,
    coats: [...isPlain ? [] : below, { optics, passes: passes * laid }, ...above], finish,
  }, light).lab
}

function described(search: Search, parts: FoundCoat['parts'], optics: PaintOptics, reached: Reached): FoundCoat {
  const { target, second, targetUnderSecond } = search
  const colourAt = colourOf(search, optics, search.light)
  // A film is looked for to within 0.02, which is many passes of one that nearly hides.
  const { passes } = search.passes.whole ? reached : nearestAround(colourAt, target, reached, search.passes.most)
  const at = (amount: number) => {
    const lab = colourAt(amount)
    return { lab, deltaE: deltaE2000(lab, target) }
  }
  const most = Math.max(1, search.passes.most)
  const whole = [...new Set([Math.floor(passes), Math.ceil(passes)])].filter(count => count >= 1 && count <= most).map(count => ({ passes: count, deltaE: at(count).deltaE }))
  const lab = colourOf(search, optics, second)(passes)
  return {
    parts, passes, ...at(passes),
    whole: whole.reduce((best, each) => each.deltaE < best.deltaE ? each : best, whole[0] ?? { passes: 1, deltaE: at(1).deltaE }),
    thin: at(passes * (1 - FILM_SPREAD)), thick: at(passes * (1 + FILM_SPREAD)),
    second: { light: second, lab, deltaE: deltaE2000(lab, targetUnderSecond) },
  }
}

function partsOf({ set, drops }: Cup<ShelfPaint>): FoundCoat['parts'] {
  return set.map(({ id }, i) => ({ id, drops: drops[i]! }))
}

function mixedIn({ set, drops }: Cup<ShelfPaint>): PaintOptics {
  return mixOptics(set.map(({ optics }, i) => ({ optics, drops: drops[i]! })))
}
