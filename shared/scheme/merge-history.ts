import type { SchemeBody } from './body'
import { sameValue } from './canonical'
import { type History, HISTORY_MAX } from './history'
import { type Choices, mergeBodies } from './merge-bodies'

type Step = History['past'][number]

/** Leaves out steps that change nothing: `next` is the body that follows the last of them. */
function withoutIdle(steps: readonly Step[], next: SchemeBody): Step[] {
  const kept: Step[] = []
  let follows = next
  for (const step of [...steps].reverse()) {
    if (sameValue(step.body, follows)) continue
    kept.unshift(step)
    follows = step.body
  }
  return kept
}

/**
 * One's own steps on top of what somebody else made of `base`: undo then takes back only what one did oneself, never what they
 * did. Steps of which nothing is left, and those that cannot be made one with theirs, are let go.
 */
export function rebaseHistory({ past, present, future }: History, base: SchemeBody, theirs: SchemeBody): History {
  const on = (body: SchemeBody) => mergeBodies(base, body, theirs, 'mine')
  const steps = (all: readonly Step[]) => all.flatMap(({ body, words }) => {
    const { body: merged, clashes } = on(body)
    return clashes.some(clash => clash.part === 'whole') ? [] : [{ body: merged, words }]
  })
  const now = on(present).body
  // What could be done again stands the other way round: nearest first.
  const ahead = withoutIdle([...steps(future)].reverse(), now).reverse()
  return { past: withoutIdle(steps(past), now), present: now, future: ahead, last: null }
}

/**
 * The history after a person chose between two versions: what was chosen, with both sides of the clashes within reach of undo,
 * first theirs, then one's own, then one's own steps. Without a base the steps before are let go.
 */
export function settleHistory(history: History, base: SchemeBody | null, theirs: SchemeBody, choices: Choices): History {
  const own = base ? rebaseHistory(history, base, theirs) : { past: [], present: history.present }
  const take = (side: Choices) => mergeBodies(base, history.present, theirs, side).body
  const chosen = take(choices)
  const steps = [...own.past, { body: take('mine'), words: 'Take the other version' }, { body: take('theirs'), words: 'Choose between two versions' }]
  return { past: withoutIdle(steps, chosen).slice(-HISTORY_MAX), present: chosen, future: [], last: null }
}
