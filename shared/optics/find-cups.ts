import { type Drops, dropMixes, setsOf } from './drop-mixes'
import type { FilmSearch, Reached } from './find-film'
import type { PaintOptics } from './paint-optics'

/** Drops of some paints in one cup, and how near they come. */
export interface Cup<P> { set: readonly P[], drops: Drops, reached: Reached }

/** How much of it is tried: drops and paints in a cup at most, and how many cups are wanted. */
export interface CupLimits { dropsMost: number, partsMost: number, answers: number }

/** How far it has come, in shares of a whole search; how often something nearer was found, and the nearest so far. */
export interface CupProgress<P> { done: number, found: number, nearest: () => Cup<P>[] }

/** Cups with so few drops are tried first, of every set: they say which sets are worth more. */
const FEW_DROPS = 4
/** Work between two rests, in cups: about a millisecond. */
const SLICE = 200

interface Tried<P> { set: readonly P[], mixes: readonly Drops[], least: number, best: Cup<P> | undefined }

/**
 * The nearest cup of each set of two and three paints, nearest first: exact over all whole drops.
 *
 * A set is left out only where no mix of its paints can come near enough, a cup only where none of its passes can. Sets that
 * came nearest with few drops go first, so that the rest has a short distance to beat.
 */
export function* nearestCups<P extends { optics: PaintOptics, cup?: string }>(paints: readonly P[], films: FilmSearch, { dropsMost, partsMost, answers }: CupLimits): Generator<CupProgress<P>, Cup<P>[], undefined> {
  const endless = new Map(paints.map(paint => [paint, films.endless(paint.optics.K, paint.optics.S)]))
  const mixesOf = new Map([2, 3].map(size => [size, dropMixes(size, dropsMost)]))
  const tried = sharedCups(paints).flatMap(together => [2, 3].filter(size => size <= partsMost)
    .flatMap(size => setsOf(size, together.length).map((places): Tried<P> => {
      const set = places.map(place => together[place]!)
      return { set, mixes: mixesOf.get(size)!, least: films.leastOf(set.map(paint => endless.get(paint)!)), best: undefined }
    })))
  const nearest: Tried<P>[] = []
  const K = new Float64Array(36), S = new Float64Array(36)
  let work = 0, found = 0

  for (const isFew of [true, false]) {
    const order = isFew ? [...tried].sort((a, b) => a.least - b.least) : [...tried].sort((a, b) => distanceOf(a) - distanceOf(b) || a.least - b.least)
    for (const [i, one] of order.entries()) {
      for (const drops of one.mixes) {
        const count = drops.reduce((sum, each) => sum + each, 0)
        if ((count <= FEW_DROPS) !== isFew) continue
        const cutoff = Math.min(distanceOf(one), nearest[answers - 1] ? distanceOf(nearest[answers - 1]!) : Infinity)
        if (one.least >= cutoff) break
        mixInto(one.set, drops, count, K, S)
        const reached = films.nearest(K, S, cutoff)
        if (reached) {
          one.best = { set: one.set, drops, reached }
          rank(nearest, one, answers)
          found++
        }
        if (++work % SLICE === 0) yield { done: 0.1 + (isFew ? 0.2 * i / order.length : 0.2 + 0.7 * i / order.length), found, nearest: () => nearest.map(({ best }) => best!) }
      }
    }
  }
  return nearest.map(one => one.best!)
}

function distanceOf({ best }: Tried<unknown>): number {
  return best?.reached.deltaE ?? Infinity
}

/** Puts a set that has come nearer into its place among the nearest. */
function rank<P>(nearest: Tried<P>[], one: Tried<P>, answers: number): void {
  if (!nearest.includes(one)) nearest.push(one)
  nearest.sort((a, b) => distanceOf(a) - distanceOf(b))
  nearest.splice(answers)
}

/** Paints by the cup they may share. */
function sharedCups<P extends { cup?: string }>(paints: readonly P[]): P[][] {
  const cups = new Map<string, P[]>()
  for (const paint of paints) {
    const cup = paint.cup ?? ''
    cups.set(cup, [...cups.get(cup) ?? [], paint])
  }
  return [...cups.values()]
}

function mixInto(set: readonly { optics: PaintOptics }[], drops: Drops, total: number, K: Float64Array, S: Float64Array): void {
  K.fill(0)
  S.fill(0)
  for (let p = 0; p < set.length; p++) {
    const { optics } = set[p]!
    const share = drops[p]! / total
    for (let i = 0; i < 36; i++) {
      K[i]! += share * optics.K[i]!
      S[i]! += share * optics.S[i]!
    }
  }
}
