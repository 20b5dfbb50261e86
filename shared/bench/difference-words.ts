import { durationWords } from './piece-words'
import type { Difference } from './run-differences'
import { countWords } from '#shared/scheme/coat-words'

const WAITS = { rest: 'rest', turn: 'time on the turner', heat: 'heat-set', cure: 'cure' } as const

/** A difference as one reads it: "Coat 3: 4 passes, not 2". `nameOf` gives a paint's name. */
export function differenceWords(difference: Difference, nameOf: (paintId: string) => string): string {
  const coat = `Coat ${difference.number}: `
  switch (difference.what) {
    case 'passes': return `${coat}${countWords(difference.done, 'pass', 'passes')}, not ${difference.planned}`
    case 'thinning': return `${coat}${countWords(difference.done, 'drop')} of reducer, not ${difference.planned}`
    case 'paint': return `${coat}${nameOf(difference.to)} in place of ${nameOf(difference.from)}`
    case 'wait': return `${coat}${WAITS[difference.kind]} ${durationWords(difference.done)}, not ${durationWords(difference.planned)}`
  }
}
