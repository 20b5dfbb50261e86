import type { DeviationKind, RunAct } from './run-event'
import { durationWords, piecesLabel, piecesWords } from './piece-words'
import { isWait, type RunStep } from './run-step'
import { nextWords, stepName } from './step-words'
import { countWords } from '#shared/scheme/coat-words'

/** What was different, as a choice and in a list. */
export const DEVIATION_WORDS: Readonly<Record<DeviationKind, string>> = {
  passes: 'Passes', thinning: 'Thinning', paint: 'Paint', wait: 'Wait', other: 'Something else',
}

const forPieces = (pieces: readonly number[] | undefined) => pieces ? `, ${piecesLabel(pieces)}` : ''

function coatNumber(steps: readonly RunStep[], coatId: string): string {
  const lay = steps.find(step => step.kind === 'lay' && step.coat.id === coatId)
  return lay?.kind === 'lay' ? String(lay.number) : '?'
}

function waitName(steps: readonly RunStep[], stepId: string): string {
  const step = named(steps, stepId)
  return step && isWait(step) ? stepName(step) : 'A wait'
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
    case 'wait-set': return 'the timer\'s new length'
    case 'wait-cut': return 'the wait cut short'
    case 'deviation': return 'last note'
    case 'bottle-used': return 'the bottle'
    case 'thinned': return 'the thinning'
    case 'paint-changed': return 'the other paint'
    case 'photo-taken': return 'the photo'
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
      return `${countWords(act.passes, 'pass', 'passes')} of coat ${coatNumber(steps, act.coatId)} on ${piecesLabel(act.pieces)}`
    }
    case 'step-done': {
      const step = named(steps, act.stepId)
      return `${step ? stepName(step) : 'A step'}${act.pieces ? `: ${piecesLabel(act.pieces)}` : ''}`
    }
    case 'wait-started': {
      const step = named(steps, act.stepId)
      return `Timer started: ${step ? stepName(step) : 'a wait'}`
    }
    case 'wait-set': return `${waitName(steps, act.stepId)} set to ${durationWords(act.seconds)}${forPieces(act.pieces)}`
    case 'wait-cut': return `${waitName(steps, act.stepId)} cut short by ${durationWords(act.secondsLeft)}${forPieces(act.pieces)}`
    case 'deviation': return `${DEVIATION_WORDS[act.what]}: ${act.note}`
    case 'bottle-used': return `Another bottle${act.coatId === undefined ? '' : ` for coat ${coatNumber(steps, act.coatId)}`}`
    case 'thinned': return `Coat ${coatNumber(steps, act.coatId)} with ${countWords(act.reducer, 'drop')} of reducer${forPieces(act.pieces)}`
    case 'paint-changed': return `Another paint in coat ${coatNumber(steps, act.coatId)}${forPieces(act.pieces)}`
    case 'photo-taken': return `Photo${act.pieces ? ` of ${piecesLabel(act.pieces)}` : ''}`
    case 'piece-set-aside': return `Piece ${act.piece} set aside: ${act.reason}`
    case 'piece-taken-up': return `Piece ${act.piece} taken up again`
    case 'inspected': return `${act.pieces.length === 1 ? 'Piece' : 'Pieces'} ${piecesWords(act.pieces)} ${act.passed ? 'passed' : 'failed'}${act.note ? `: ${act.note}` : ''}`
    case 'run-finished': return 'Run finished'
    case 'taken-back': return 'Taken back'
  }
}
