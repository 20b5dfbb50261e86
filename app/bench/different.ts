import type { DeviationKind, RunAct } from '#shared/bench/run-event'
import type { RunStep } from '#shared/bench/run-step'
import type { RunBottle } from '#shared/bench/run-view'

/** What a step can be done differently in. */
export type Different = DeviationKind | 'photo'

/** What was different, as a choice. */
export const DIFFERENT_WORDS: Readonly<Record<Different, string>> = {
  passes: 'Passes', thinning: 'Thinning', paint: 'Paint or bottle', wait: 'Wait', other: 'Something else', photo: 'Photo',
}

/** The usual words, to tap (common practice). */
export const SAID: Readonly<Record<Different, readonly string[]>> = {
  passes: ['One pass more', 'Two passes more', 'One pass fewer'],
  thinning: ['Thinner', 'Thicker', 'Other reducer'],
  paint: [],
  wait: ['Waited longer', 'Went on early', 'Warmed it'],
  other: ['Other pressure', 'Other distance', 'Other needle', 'Mask slipped', 'Redone'],
  photo: [],
}

const MORE: Readonly<Record<string, number>> = { 'One pass more': 1, 'Two passes more': 2 }

/** What can be said at a step, the likeliest first. */
export function differentTopics(step: RunStep): Different[] {
  switch (step.kind) {
    case 'lay': return ['passes', 'thinning', 'paint', 'other', 'photo']
    case 'mix': return ['thinning', 'paint', 'other', 'photo']
    case 'rest':
    case 'heat':
    case 'cure':
    case 'turn': return ['wait', 'other', 'photo']
    case 'prepare':
    case 'warm':
    case 'set':
    case 'test':
    case 'look-over':
    case 'fit':
    case 'lift':
    case 'clean':
    case 'eyes':
    case 'inspect': return ['other', 'photo']
  }
}

/** What somebody tapped and wrote. */
export interface SaidDifferent {
  topic: Different
  step: RunStep
  said: readonly string[]
  note: string
  /** Drops of reducer, when they were changed. */
  reducer: number | null
  bottle: RunBottle | null
  otherPaint: { from: string, to: string } | null
  /** The pieces it is about; undefined for all of the run. */
  pieces: readonly number[] | undefined
  /** The pieces at this step. */
  partPieces: readonly number[]
}

/** The acts that say so: figures where there are some, so that a draft can be made of them, and words where there are not. */
export function differentActs({ topic, step, said, note, reducer, bottle, otherPaint, pieces, partPieces }: SaidDifferent): RunAct[] {
  const about = pieces ? { pieces: [...pieces] } : {}
  const words = (what: DeviationKind): RunAct[] => note === '' ? [] : [{ v: 1, kind: 'deviation', stepId: step.id, what, note, ...about }]
  const coatId = 'coat' in step ? step.coat.id : null
  switch (topic) {
    case 'passes': {
      const passes = said.reduce((sum, each) => sum + (MORE[each] ?? 0), 0)
      const laid: RunAct[] = coatId !== null && passes > 0 ? [{ v: 1, kind: 'pass-laid', coatId, pieces: [...partPieces], passes }] : []
      return [...words('passes'), ...laid]
    }
    case 'thinning': return [...coatId !== null && reducer !== null ? [{ v: 1 as const, kind: 'thinned' as const, coatId, reducer, ...about }] : [], ...words('thinning')]
    case 'paint': return [
      ...bottle && coatId !== null ? [{ v: 1 as const, kind: 'bottle-used' as const, paintId: bottle.paintId, bottleId: bottle.id, coatId }] : [],
      ...otherPaint && coatId !== null ? [{ v: 1 as const, kind: 'paint-changed' as const, coatId, ...otherPaint, ...about }] : [],
      ...words('paint'),
    ]
    case 'wait':
    case 'other': return words(topic)
    case 'photo': return []
  }
}
