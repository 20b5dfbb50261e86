import type { SpreadCause } from './spread'

/** Figures a painter can hold on to; a promise is never told finer than it is. */
const STEPS = [0.5, 1, 1.5, 2, 3, 4, 5, 6, 8, 10, 12, 15, 20, 25, 30, 40] as const

/** A cause must make up so much of the whole, by its square, to be named. */
const NAMED_SHARE = 0.25

/**
 * How sure a promise is, in a sentence or two: how near, and what most of the rest hangs on.
 *
 * @param numbers what the coats are called, from the ground up; 1, 2, 3 … when left out
 */
export function spreadWords({ typical, most, causes }: { typical: number, most: number, causes: readonly SpreadCause[] }, numbers?: readonly number[]): string {
  const [near, far] = [step(typical), step(most)]
  const within = near === far ? `Mostly within ${far}.` : `Typically within ${near}, mostly within ${far}.`
  const whole = causes.reduce((sum, { deltaE }) => sum + deltaE ** 2, 0)
  const [largest] = causes
  return largest && largest.deltaE ** 2 >= NAMED_SHARE * whole ? `${within} Most of that ${CAUSE_WORDS[largest.what](largest.coats.map(coat => numbers?.[coat] ?? coat + 1))}.` : within
}

function step(deltaE: number): number {
  return STEPS.find(each => deltaE <= each) ?? 40
}

/** What a cause is, after "Most of that"; given the numbers of its coats. */
export const CAUSE_WORDS: Readonly<Record<SpreadCause['what'], (coats: readonly number[]) => string>> = {
  'film': coats => `is how thick ${coatsInWords(coats)} goes on`,
  'paint data': coats => `is how the paint of ${coatsInWords(coats)} is known`,
  'pearl estimate': coats => `is the estimate of the flakes in ${coatsInWords(coats)}`,
  'glow estimate': coats => `is the estimate of the glow of ${coatsInWords(coats)}`,
  'yellowing': coats => `is how far ${coatsInWords(coats)} has yellowed`,
  'ground': () => 'is how the ground was read',
  'bands': () => 'is the reckoning itself',
}

function coatsInWords(coats: readonly number[]): string {
  return coats.length === 1 ? `coat ${coats[0]}` : `coats ${coats.slice(0, -1).join(', ')} and ${coats.at(-1)}`
}
