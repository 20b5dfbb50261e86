import type { Spectrum } from './bands'
import type { Lab, Light } from './colorimetry'
import { deltaE2000 } from './delta-e'
import { type ColourRange, labFromSums, rangeBound, rangeWeights } from './find-bound'
import type { FindScene } from './find-scene'
import { weightsFor } from './lights'

/** What one amount of paint comes to. */
export interface Reached { passes: number, deltaE: number }

/** Passes that may be laid: whole ones only, or any up to a most. */
export interface PassesAllowed { most: number, whole: boolean }

/** Looks for the passes of films over one scene. */
export interface FilmSearch {
  /** The nearest that a film of K and S per pass comes; undefined when no passes bring it nearer than `cutoff`, CIEDE2000. */
  nearest: (K: Spectrum, S: Spectrum, cutoff: number) => Reached | undefined
  /** No mix of these films comes nearer than this, however many drops and passes. */
  leastOf: (endless: readonly Float64Array[]) => number
  /** What an endless film of K and S looks like, band by band: what `leastOf` is asked with. */
  endless: (K: Spectrum, S: Spectrum) => Float64Array
}

/** Below this the root of a film's depth is held, so that nothing is divided by 0; wrong by less than 1e-9 of R. */
const ROOT_LEAST = 1e-7
/** Any passes: a stretch whose ends are so alike, CIEDE2000, is as good as straight: its nearest is found by parabolas. */
const STRAIGHT = 2
/** Parabolas laid through a straight stretch. */
const PARABOLAS = 3
/** Any passes: between two amounts of paint a colour strays from its ends by at most so many times their distance. Taken wide; checked on random films. */
const STRAYS = 1.2
/** Any passes: the ladder begins at this share of the most. */
const LOWEST_SHARE = 1 / 64
const BANDS = 36
const ROOM = 64

/**
 * Sets up a search that is exact: branch and bound over passes.
 *
 * In every band what is seen goes one way only as passes are added (towards the endless film), so what lies between two
 * amounts of paint lies between their two spectra. A stretch of passes whose range of colours cannot come near enough is
 * left out whole; the rest is halved. Whole passes: the nearest of all, proven. Any passes: to within 0.02, since there what is
 * left is halved only until it is short (`STRAYS`, `STRAIGHT`).
 *
 * With E = exp(−kX), g = (1 − E²)/k and C = 1 + E², a film over a ground G is N/M with N = (S − G(K+S))·g + G·C and
 * M = (K + S − SG)·g + C: one exponential and one division a band, clear coats above and the surface included.
 */
export function filmSearch(scene: FindScene, target: Lab, light: Light, { most, whole }: PassesAllowed): FilmSearch {
  const ladder = whole
    ? Array.from({ length: Math.max(1, Math.floor(most)) + 1 }, (_, i) => i)
    : [0, ...Array.from({ length: 7 }, (_, i) => most * LOWEST_SHARE * 2 ** i)]
  const weights = rangeWeights(weightsFor(light))
  const wy = weights.y, wu = weights.u, wv = weights.v
  const [halfY, halfU, halfV] = [wy, wu, wv].map(each => each.map(value => Math.abs(value) / 2)) as [Float64Array, Float64Array, Float64Array]
  const bound = rangeBound(target)
  const { ground, laid, shine, hasShine } = scene
  const { top, topM, low, lowM, veil } = scene.through

  const root = new Float64Array(BANDS), inverse = new Float64Array(BANDS), n = new Float64Array(BANDS), m = new Float64Array(BANDS), dims = new Float64Array(BANDS)
  // One place a rung of the ladder, then places for halves of halves.
  const places = ladder.length + ROOM
  const seen = new Float64Array(places * BANDS), mirrored = new Float64Array(places * BANDS)
  const sums = new Float64Array(places * 3), passesAt = new Float64Array(places), distances = new Float64Array(places)
  // What one pass, or the first rung, lets through; the rungs are powers of it.
  const once = new Float64Array(BANDS)
  const step = whole ? 1 : ladder[1]!
  const range: ColourRange = { y: 0, yHalf: 0, u: 0, uHalf: 0, v: 0, vHalf: 0 }
  let best: Reached = { passes: 0, deltaE: Infinity }
  let free = ladder.length

  function setFilm(K: Spectrum, S: Spectrum): void {
    for (let b = 0; b < BANDS; b++) {
      const Kb = K[b]!, Sb = S[b]!, both = Kb + Sb, G = ground[b]!
      const k = Math.max(ROOT_LEAST, Math.sqrt(Kb * (both + Sb)))
      root[b] = k * laid
      inverse[b] = 1 / k
      n[b] = Sb - G * both
      m[b] = both - Sb * G
      once[b] = Math.exp(-root[b]! * step)
      if (hasShine) dims[b] = 2 * both * laid
    }
    free = ladder.length
  }

  /** Works out what some passes look like, at a place. */
  function see(place: number, passes: number): void {
    const at = place * BANDS
    // Rungs are whole multiples of the step.
    const power = place < ladder.length ? Math.round(passes / step) : -1
    let y = 0, u = 0, v = 0
    for (let b = 0; b < BANDS; b++) {
      const E = power < 0 ? Math.exp(-root[b]! * passes) : raised(once[b]!, power), E2 = E * E
      const g = (1 - E2) * inverse[b]!, C = 1 + E2
      const N = n[b]! * g + ground[b]! * C, M = m[b]! * g + C
      let r = (top[b]! * N + topM[b]! * M) / (low[b]! * N + lowM[b]! * M) + veil
      seen[at + b] = r
      if (hasShine) {
        const mirror = shine[b]! * Math.exp(-dims[b]! * passes)
        mirrored[at + b] = mirror
        r = Math.max(0, r + mirror)
      }
      y += wy[b]! * r
      u += wu[b]! * r
      v += wv[b]! * r
    }
    sums[place * 3] = y
    sums[place * 3 + 1] = u
    sums[place * 3 + 2] = v
    passesAt[place] = passes
    distances[place] = Infinity
    if (passes > 0) judge(place)
  }

  /** Takes a place for the best where it is. */
  function judge(place: number): void {
    const y = sums[place * 3]!, u = sums[place * 3 + 1]!, v = sums[place * 3 + 2]!
    range.y = y
    range.u = u
    range.v = v
    range.yHalf = range.uHalf = range.vHalf = 0
    if (bound.least(range, best.deltaE) >= best.deltaE) return
    const deltaE = deltaE2000(labFromSums(y, u, v), target)
    distances[place] = deltaE
    if (deltaE < best.deltaE) best = { passes: passesAt[place]!, deltaE }
  }

  /** The least distance between two places, from the range between their spectra. */
  function least(from: number, to: number): number {
    const a = from * BANDS, z = to * BANDS
    let yHalf = 0, uHalf = 0, vHalf = 0
    for (let b = 0; b < BANDS; b++) {
      let gap = Math.abs(seen[a + b]! - seen[z + b]!)
      if (hasShine) gap += Math.abs(mirrored[a + b]! - mirrored[z + b]!)
      yHalf += halfY[b]! * gap
      uHalf += halfU[b]! * gap
      vHalf += halfV[b]! * gap
    }
    range.y = (sums[from * 3]! + sums[to * 3]!) / 2
    range.u = (sums[from * 3 + 1]! + sums[to * 3 + 1]!) / 2
    range.v = (sums[from * 3 + 2]! + sums[to * 3 + 2]!) / 2
    range.yHalf = yHalf
    range.uHalf = uHalf
    range.vHalf = vHalf
    return bound.least(range, best.deltaE)
  }

  function cutLadder(from: number, to: number): void {
    if (to - from < 2) {
      if (!whole && to > from) halve(from, to)
      return
    }
    const middle = (from + to) >> 1
    see(middle, ladder[middle]!)
    const below = least(from, middle), above = least(middle, to)
    if (below <= above) {
      if (below < best.deltaE) cutLadder(from, middle)
      if (above < best.deltaE) cutLadder(middle, to)
    }
    else {
      if (above < best.deltaE) cutLadder(middle, to)
      if (below < best.deltaE) cutLadder(from, middle)
    }
  }

  /** Any passes: halves what lies between two places until nothing nearer can be there. */
  function halve(from: number, to: number): void {
    if (least(from, to) >= best.deltaE || free >= places) return
    const apart = deltaE2000(labAt(from), labAt(to))
    if (Math.max(distanceAt(from), distanceAt(to)) - STRAYS * apart >= best.deltaE) return
    if (apart < STRAIGHT) return settle(from, to)
    const middle = free++
    see(middle, (passesAt[from]! + passesAt[to]!) / 2)
    const isLower = distanceAt(from) <= distanceAt(to)
    halve(isLower ? from : middle, isLower ? middle : to)
    halve(isLower ? middle : from, isLower ? to : middle)
    free = middle
  }

  /** The nearest of a straight stretch: its squared distance is nearly a parabola. */
  function settle(from: number, to: number): void {
    const place = free++
    let [low, high] = [passesAt[from]!, passesAt[to]!]
    let [atLow, atHigh] = [distanceAt(from) ** 2, distanceAt(to) ** 2]
    let middle = (low + high) / 2
    see(place, middle)
    let atMiddle = distanceAt(place) ** 2
    for (let round = 0; round < PARABOLAS; round++) {
      const next = vertex(low, atLow, middle, atMiddle, high, atHigh)
      if (!(next > low && next < high) || Math.abs(next - middle) < 1e-3 * high) break
      see(place, next)
      const there = distanceAt(place) ** 2
      const isNearer = there < atMiddle
      const [left, atLeft, right, atRight] = next < middle ? [next, there, middle, atMiddle] : [middle, atMiddle, next, there]
      if (isNearer === (next < middle)) [high, atHigh, middle, atMiddle] = [right, atRight, left, atLeft]
      else [low, atLow, middle, atMiddle] = [left, atLeft, right, atRight]
    }
    free = place
  }

  function distanceAt(place: number): number {
    if (distances[place] === Infinity) distances[place] = deltaE2000(labAt(place), target)
    return distances[place]!
  }

  function labAt(place: number): Lab {
    return labFromSums(sums[place * 3]!, sums[place * 3 + 1]!, sums[place * 3 + 2]!)
  }

  // The bare ground is the same for every film.
  setFilm(new Float64Array(BANDS), new Float64Array(BANDS))
  see(0, 0)
  distances[0] = deltaE2000(labAt(0), target)

  return {
    nearest(K, S, cutoff) {
      best = { passes: 0, deltaE: cutoff }
      setFilm(K, S)
      const last = ladder.length - 1
      see(last, ladder[last]!)
      if (least(0, last) < best.deltaE) cutLadder(0, last)
      return best.passes > 0 ? best : undefined
    },
    endless(K, S) {
      return Float64Array.from(ground, (G, b) => {
        const Kb = K[b]!, Sb = S[b]!
        // A film that does nothing in a band leaves the ground.
        const R = Kb + Sb === 0 ? G : Sb / (Kb + Sb + Math.sqrt(Kb * (Kb + 2 * Sb)))
        return (top[b]! * R + topM[b]!) / (low[b]! * R + lowM[b]!) + veil
      })
    },
    leastOf(endless) {
      let y = 0, u = 0, v = 0, yHalf = 0, uHalf = 0, vHalf = 0
      for (let b = 0; b < BANDS; b++) {
        const bare = (top[b]! * ground[b]! + topM[b]!) / (low[b]! * ground[b]! + lowM[b]!) + veil
        let lowest = bare, highest = bare
        for (const each of endless) {
          if (each[b]! < lowest) lowest = each[b]!
          if (each[b]! > highest) highest = each[b]!
        }
        if (hasShine) {
          lowest += Math.min(0, shine[b]!)
          highest += Math.max(0, shine[b]!)
        }
        const middle = (lowest + highest) / 2, half = (highest - lowest) / 2
        y += wy[b]! * middle
        u += wu[b]! * middle
        v += wv[b]! * middle
        yHalf += 2 * halfY[b]! * half
        uHalf += 2 * halfU[b]! * half
        vHalf += 2 * halfV[b]! * half
      }
      return bound.least({ y, yHalf, u, uHalf, v, vHalf }, Infinity)
    },
  }
}

/** Where the parabola through three points is least; not a number when it has no least. */
function vertex(a: number, atA: number, b: number, atB: number, c: number, atC: number): number {
  const left = (b - a) * (atB - atC), right = (b - c) * (atB - atA)
  const bend = left - right
  return bend < 0 ? b - ((b - a) * left - (b - c) * right) / (2 * bend) : Number.NaN
}

/** A whole power, ≥ 0, of what one pass lets through. */
function raised(base: number, power: number): number {
  let result = 1, square = base
  for (let left = power; left > 0; left >>= 1) {
    if (left & 1) result *= square
    square *= square
  }
  return result
}
