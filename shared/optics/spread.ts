import type { Lab, Light } from './colorimetry'
import { deltaE2000 } from './delta-e'
import { type DoubtAbout, doubtsOf } from './doubts'
import { type QuickCoat, quickCoat, quickLab } from './quick-eye'
import { type ExactSeen, resolveSeen } from './seen-exact'
import { spreadWords } from './spread-words'
import type { Stack } from './stack'

/** How much of a promise's spread one thing accounts for. */
export interface SpreadCause {
  what: DoubtAbout | 'bands'
  /** The coats it bears on, by their place from the ground up; none for the ground and the bands. */
  coats: readonly number[]
  /** What one standard deviation of it moves the promise by, CIEDE2000. */
  deltaE: number
}

/** How sure a promise is. */
export interface PromiseSpread {
  /** Half of all pieces painted so will lie within this of the promise, CIEDE2000. */
  typical: number
  /** And nineteen in twenty within this. */
  most: number
  /** What it comes from, the largest first; what moves the promise by less than a tenth is left out. */
  causes: SpreadCause[]
  words: string
}

/** What 16 bands, and a spectrum made from a colour, add by themselves, CIEDE2000: measured against measured pigments' own spectra. */
const BANDS_DOUBT = 0.3
/** Too little to speak of. */
const LEAST = 0.1
/** Quantiles of the bell: half, and nineteen in twenty. */
const HALF = 0, NINETEEN_IN_TWENTY = 1.6448536269514722

/**
 * How sure the promised colour of a stack is: every coat's film, every paint's data and the ground are each moved by one standard
 * deviation up and down (`doubts.ts`), and what the promise moves by is added as independent errors are.
 *
 * Differences are kept by direction, since ten small errors of one kind make a longer tail than ten of all kinds: the squared
 * distance is taken for a scaled chi-square of as many dimensions as the errors really have.
 *
 * @param by      a light by name in air, or anything a piece can be seen by
 * @param numbers what the coats are called in words, from the ground up; 1, 2, 3 … when left out
 * @param laid    `quickCoat` of every coat, where a caller has them
 * @accuracy on random stacks of up to six coats, against the same errors drawn together: from a quarter too little to six tenths too much on nine in ten
 * @source F. E. Satterthwaite, Biometrics Bull. 2 (1946) 110–114, for the dimensions; E. B. Wilson, M. M. Hilferty, Proc. Natl. Acad.
 *         Sci. 17 (1931) 684–688, for the quantiles
 */
export function promiseSpread(stack: Stack, by: Light | ExactSeen = 'D65', numbers?: readonly number[], laid: readonly QuickCoat[] = quickCoats(stack, resolveSeen(by))): PromiseSpread {
  const seen = resolveSeen(by)
  const promised = quickLab(stack, laid, seen)
  const moments = new Float64Array(9)
  const causes = new Map<string, SpreadCause>()
  const note = (what: SpreadCause['what'], coats: readonly number[], square: number) => {
    const key = `${what} ${coats.join()}`
    const before = causes.get(key)?.deltaE ?? 0
    causes.set(key, { what, coats, deltaE: Math.sqrt(before ** 2 + square) })
  }
  for (const { about, coats, apply } of doubtsOf(stack)) {
    let square = 0
    for (const deviation of [1, -1]) {
      const moved = apply(stack, deviation)
      const shift = shiftOf(promised, quickLab(moved, relaid(moved, laid, coats, seen), seen))
      for (let i = 0; i < 9; i++) moments[i]! += shift[Math.floor(i / 3)]! * shift[i % 3]! / 2
      square += (shift[0] ** 2 + shift[1] ** 2 + shift[2] ** 2) / 2
    }
    note(about, coats, square)
  }
  for (let i = 0; i < 3; i++) moments[4 * i]! += BANDS_DOUBT ** 2 / 3
  note('bands', [], BANDS_DOUBT ** 2)
  const told = [...causes.values()].filter(({ deltaE }) => deltaE >= LEAST).sort((a, b) => b.deltaE - a.deltaE)
  const figures = { typical: quantile(moments, HALF), most: quantile(moments, NINETEEN_IN_TWENTY), causes: told }
  return { ...figures, words: spreadWords(figures, numbers) }
}

function quickCoats({ coats }: Stack, seen: ExactSeen): QuickCoat[] {
  return coats.map(coat => quickCoat(coat, seen))
}

/** Only the coats that changed are worked out anew. */
function relaid({ coats }: Stack, laid: readonly QuickCoat[], changed: readonly number[], seen: ExactSeen): QuickCoat[] {
  const fresh = [...laid]
  for (const at of changed) fresh[at] = quickCoat(coats[at]!, seen)
  return fresh
}

type Shift = readonly [number, number, number]

/** A difference as long as CIEDE2000 says, pointing where it points in lightness, chroma and hue. */
function shiftOf(from: Lab, to: Lab): Shift {
  const length = deltaE2000(from, to)
  if (length === 0) return [0, 0, 0]
  const chroma = Math.hypot(from[1], from[2]), other = Math.hypot(to[1], to[2])
  const weight = 1 + 0.045 * chroma
  const along: Shift = [to[0] - from[0], (other - chroma) / weight, hueStep(from, to, chroma, other) / (1 + 0.015 * chroma)]
  const scale = length / Math.max(1e-12, Math.hypot(...along))
  return [along[0] * scale, along[1] * scale, along[2] * scale]
}

function hueStep(from: Lab, to: Lab, chroma: number, other: number): number {
  const square = (to[1] - from[1]) ** 2 + (to[2] - from[2]) ** 2 - (other - chroma) ** 2
  return Math.sign(from[1] * to[2] - from[2] * to[1]) * Math.sqrt(Math.max(0, square))
}

/** Length that a bell-shaped error of these second moments stays within, at a quantile of the plain bell. */
function quantile(moments: Float64Array, z: number): number {
  const whole = moments[0]! + moments[4]! + moments[8]!
  const squares = moments.reduce((sum, moment) => sum + moment * moment, 0)
  const dimensions = whole ** 2 / squares
  const a = 2 / (9 * dimensions)
  return Math.sqrt(squares / whole * dimensions * (1 - a + z * Math.sqrt(a)) ** 3)
}
