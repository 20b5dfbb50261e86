import type { DeviationKind, RunAct } from './run-event'
import { piecesLabel, piecesWords } from './piece-words'
import type { RunStep } from './run-step'
import { nextWords, stepName } from './step-words'
import { countWords } from '#shared/scheme/coat-words'

/** What was different, as a choice and in a list. */
export const DEVIATION_WORDS: Readonly<Record<DeviationKind, string>> = {
  passes: 'Passes', thinning: 'Thinning', paint: 'Paint', wait: 'Wait', other: 'Something else',
}

const named = (steps: readonly RunStep[], stepId: string) => steps.find(step => step.id === stepId)

/** What a take-back would undo, in little room: "pass on 8", "rest 6 min". */
export function takeBackWords(act: RunAct, steps: readonly RunStep[]): string {
  switch (act.kind) {
    case 'pass-laid': return act.pieces.length === 1 ? `pass on ${act.pieces[0]}` : `${act.pieces.length} passes`
    case 'step-done': {
      const step = named(steps, act.stepId)
      return step ? `to ${nextWords(step)}` : 'last step'
    }
    case 'wait-started': return 'timer start'
    case 'deviation': return 'last note'
    case 'piece-set-aside': return `${act.piece} set aside`
    case 'piece-taken-up': return `${act.piece} taken up`
    case 'inspected': return act.pieces.length === 1 ? `look at ${act.pieces[0]}` : `look at ${countWords(act.pieces.length, 'piece')}`
    case 'run-finished': return 'the finish'
    case 'taken-back': return ''
  }
}

/** An act as a log tells it: "3 passes of coat 9 on pieces 1–4". */
export function actWords(act: RunAct, steps: readonly RunStep[]): string {
  switch (act.kind) {
    case 'pass-laid': {
      const lay = steps.find(step => step.kind === 'lay' && step.coat.id === act.coatId)
      return `${countWords(act.passes, 'pass', 'passes')} of coat ${lay?.kind === 'lay' ? lay.number : '?'} on ${piecesLabel(act.pieces)}`
    }
    case 'step-done': {
      const step = named(steps, act.stepId)
      return `${step ? stepName(step) : 'A step'}${act.pieces ? `: ${piecesLabel(act.pieces)}` : ''}`
    }
    case 'wait-started': {
      const step = named(steps, act.stepId)
      return `Timer started: ${step ? stepName(step) : 'a wait'}`
    }
    case 'deviation': return `${DEVIATION_WORDS[act.what]}: ${act.note}`
    case 'piece-set-aside': return `Piece ${act.piece} set aside: ${act.reason}`
    case 'piece-taken-up': return `Piece ${act.piece} taken up again`
    case 'inspected': return `${act.pieces.length === 1 ? 'Piece' : 'Pieces'} ${piecesWords(act.pieces)} ${act.passed ? 'passed' : 'failed'}${act.note ? `: ${act.note}` : ''}`
    case 'run-finished': return 'Run finished'
    case 'taken-back': return 'Taken back'
  }
}
