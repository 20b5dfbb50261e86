import { DEVIATION_NOTE_MAX, type RunAct } from '#shared/bench/run-event'
import { clockWords, countInLetters, piecesWords } from '#shared/bench/piece-words'
import { isReady, type Part, stepAfter, waitLeft } from '#shared/bench/run-parts'
import { isWait, type RunStep } from '#shared/bench/run-step'
import { passesOn, type RunPlan, type RunState } from '#shared/bench/run-state'
import { countWords } from '#shared/scheme/coat-words'

/** Pieces of a part that have had what their step asks, and those that have not. */
export interface Readiness { ready: number[], open: number[] }

/** Tells the two apart at a moment, ms. */
export function readiness({ step, pieces }: Part, state: RunState, now: number): Readiness {
  const isDone = (piece: number) => step !== undefined && isReady(step, piece, state, now)
  return { ready: pieces.filter(isDone), open: pieces.filter(piece => !isDone(piece)) }
}

/** What it means that these pieces of a part go on: notes on what they miss, then the step behind them and the wait that begins. */
export function goingOn(plan: RunPlan, state: RunState, part: Part, pieces: readonly number[], now: number): RunAct[] {
  const { step } = part
  if (!step || pieces.length === 0) return []
  const next = stepAfter(plan, state, { ...part, pieces: [...pieces] })
  const open = pieces.filter(piece => !isReady(step, piece, state, now))
  return [
    ...missed(step, open, state, now),
    {
      v: 1, kind: 'step-done', stepId: step.id,
      ...pieces.length < plan.pieces ? { pieces: [...pieces] } : {},
      // What is done ahead begins no rest: nobody stands there yet.
      ...next && !part.isAhead && startsByItself(next) ? { starts: next.id } : {},
    },
  ]
}

/** A lamp or a heat gun is switched on by hand; a rest begins with the last pass. */
function startsByItself(step: RunStep): boolean {
  return step.kind === 'rest' || step.kind === 'turn'
}

function missed(step: RunStep, open: readonly number[], state: RunState, now: number): RunAct[] {
  if (open.length === 0) return []
  if (step.kind === 'lay') {
    const note = open.map(piece => `Piece ${piece} went on with ${passesOn(step.coat.id, piece, state)} of ${countWords(step.coat.passes, 'pass', 'passes')}.`).join(' ').slice(0, DEVIATION_NOTE_MAX)
    return [{ v: 1, kind: 'deviation', stepId: step.id, what: 'passes', note, pieces: [...open] }]
  }
  if (isWait(step)) return [{ v: 1, kind: 'wait-cut', stepId: step.id, secondsLeft: Math.ceil(longest(step, open, state, now) / 1000), pieces: [...open] }]
  return []
}

const longest = (step: RunStep, pieces: readonly number[], state: RunState, now: number) => Math.max(...pieces.map(piece => waitLeft(step, piece, state, now)))

/** What is asked when a step is left before every piece is ready for it. */
export interface LeavingEarly {
  title: string
  words: string
  /** What the ready ones would do, and what becomes of the others; null when none is ready. */
  split: { word: string, second: string } | null
  all: string
}

/** The question, in counts and names of pieces; null when every piece is ready. */
export function leavingEarly({ step }: Part, { ready, open }: Readiness, state: RunState, now: number): LeavingEarly | null {
  if (!step || open.length === 0) return null
  const split = ready.length === 0 ? null : { word: `${piecesWords(ready)} ${ready.length === 1 ? 'goes' : 'go'} on`, second: `${piecesWords(open)} ${open.length === 1 ? 'follows' : 'follow'} as a second part` }
  const count = `${countInLetters(open.length)} ${open.length === 1 ? 'piece is' : 'pieces are'}`
  const all = ready.length === 0 ? 'Go on all the same' : 'All go on as they are'
  const sentence = `${count[0]?.toUpperCase()}${count.slice(1)}`
  switch (step.kind) {
    case 'lay': return { title: `${sentence} not done`, words: `${piecesWords(open)} ${open.length === 1 ? 'has' : 'have'} not had all ${countWords(step.coat.passes, 'pass', 'passes')} of coat ${step.number}.`, split, all }
    case 'inspect': return { title: `${sentence} not looked at`, words: `Nothing is noted yet for ${piecesWords(open)}.`, split: null, all }
    default: return { title: `${sentence} still waiting`, words: `${piecesWords(open)} ${open.length === 1 ? 'has' : 'have'} ${clockWords(longest(step, open, state, now))} to go.`, split, all }
  }
}
