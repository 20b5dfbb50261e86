import { isFor, isWait, type RunStep, waitSeconds } from './run-step'
import { partsOf, partToDo, waitLeft } from './run-parts'
import { isThrough, piecesGoingOn, type RunPlan, type RunState } from './run-state'

/**
 * How long a step keeps one pair of hands, minutes: for all pieces at once, and for each piece. Planning values (common
 * practice); a pass takes three quarters of a minute a piece, a brushed or dipped one two.
 */
export function handMinutes(step: RunStep): { once: number, each: number } {
  switch (step.kind) {
    case 'prepare': return { once: 10, each: 0 }
    case 'warm': return { once: 5, each: 0 }
    case 'mix': return { once: 4, each: 0 }
    case 'set': return { once: 2, each: 0 }
    case 'test': return { once: 1, each: 0 }
    case 'clean': return { once: 3, each: 0 }
    case 'fit': return { once: 0, each: 0.5 }
    case 'lay': return { once: 0, each: step.coat.passes * (step.coat.tool.kind === 'airbrush' ? 0.75 : 2) }
    case 'heat': return { once: 0, each: step.seconds / 60 }
    case 'lift': return { once: 0, each: 0.25 }
    case 'eyes': return { once: 0, each: 1.5 }
    case 'look-over': return { once: 0, each: 0.25 }
    case 'inspect': return { once: 0, each: 0.5 }
    case 'rest':
    case 'turn':
    case 'cure': return { once: 0, each: 0 }
  }
}

/** Minutes a step takes by itself, without hands. */
function restMinutes(step: RunStep): number {
  return isWait(step) && step.kind !== 'heat' ? waitSeconds(step) / 60 : 0
}

const isOnce = (step: RunStep) => handMinutes(step).once > 0

/** One thing the hands do. */
export interface Doing { step: RunStep, /** The piece; null for all at once. */ piece: number | null, from: number, to: number }

/** An order of work, with what it comes to in minutes from the start. */
export interface BenchOrder {
  doings: Doing[]
  /** When every piece is through. */
  end: number
  /** How long the hands wait in all, before the last of them is done. */
  idle: number
}

/** Keeps the books of an order while it is made. */
class Book {
  readonly doings: Doing[] = []
  clock = 0
  idle = 0
  end = 0
  /** Where each piece stands, and from when it may go on, minutes. */
  readonly at: { piece: number, next: number, free: number }[]

  constructor(readonly plan: RunPlan) {
    this.at = Array.from({ length: plan.pieces }, (_, n) => ({ piece: n + 1, next: 0, free: 0 }))
    for (const one of this.at) this.pass(one)
  }

  /** Lets a piece go past what is not for it, what is done for all at once, and what only takes time. */
  pass(one: { piece: number, next: number, free: number }): void {
    for (;;) {
      const step = this.plan.steps[one.next]
      if (!step) break
      if (isFor(step, one.piece) && !isOnce(step)) {
        if (handMinutes(step).each > 0) break
        one.free += restMinutes(step)
      }
      one.next++
    }
    this.end = Math.max(this.end, one.free)
  }

  do(step: RunStep, piece: number | null, minutes: number, notBefore: number): void {
    const from = Math.max(this.clock, notBefore)
    this.idle += from - this.clock
    this.clock = from + minutes
    this.end = Math.max(this.end, this.clock)
    this.doings.push({ step, piece, from, to: this.clock })
  }
}

/**
 * The order of work for one pair of hands that wastes least waiting, by a greedy rule: of what can be done now, first the
 * airbrush (clean out, mix and set for the next coat, while pieces rest), then the piece that may go on and stands furthest
 * behind, of those the one that has waited longest; when nothing can be done, wait for the piece that is free first. Colour
 * by colour: a cup is emptied only when every piece has had its coats. Greedy is not always the best there is, and is never
 * longer than doing each step on all pieces and then waiting (checked).
 *
 * With one coat of t minutes a piece and a rest of F, N pieces take max(N·t, t + F) a coat, as the trade reckons.
 */
export function benchOrder(plan: RunPlan): BenchOrder {
  const book = new Book(plan)
  const { steps } = plan
  const once = steps.flatMap((step, index) => isOnce(step) ? [index] : [])
  let done = 0
  for (;;) {
    const next = once[done]
    const step = next === undefined ? undefined : steps[next]
    // What is done once for all waits for every piece that is laid from the cup before it, and for no rest.
    if (step && book.at.every(one => one.next > next! || !steps.slice(one.next, next).some(each => each.kind === 'lay' && isFor(each, one.piece)))) {
      book.do(step, null, handMinutes(step).once, 0)
      done++
      continue
    }
    const limit = next ?? steps.length
    const open = book.at.filter(one => one.next < limit)
    if (open.length === 0) {
      if (next === undefined) break
      continue
    }
    const now = open.filter(one => one.free <= book.clock)
    const one = now.length > 0
      ? now.reduce((a, b) => b.next < a.next || (b.next === a.next && b.free < a.free) ? b : a)
      : open.reduce((a, b) => b.free < a.free || (b.free === a.free && b.next < a.next) ? b : a)
    const own = steps[one.next]!
    book.do(own, one.piece, handMinutes(own).each, one.free)
    one.free = book.clock
    one.next++
    book.pass(one)
  }
  return { doings: book.doings, end: book.end, idle: book.idle }
}

/** The order nobody should work in: each step on all pieces, then everybody waits until the last of them has rested. */
export function stepByStep(plan: RunPlan): BenchOrder {
  const book = new Book(plan)
  let free = 0
  for (const step of plan.steps) {
    const { once, each } = handMinutes(step)
    const pieces = book.at.filter(one => isFor(step, one.piece))
    if (once > 0) book.do(step, null, once, free)
    else if (each > 0) for (const one of pieces) book.do(step, one.piece, each, free)
    free = Math.max(free, book.clock) + restMinutes(step)
    book.end = Math.max(book.end, free)
  }
  return { doings: book.doings, end: book.end, idle: book.idle }
}

/**
 * What the hands can do for all pieces at once while every one of them only waits: clean out, then mix, set and test for the
 * next coat. Undefined when some piece can go on, or nothing of the kind can be done yet. `now` is the clock, ms.
 */
export function meanwhile(plan: RunPlan, state: RunState, now: number): RunStep | undefined {
  const part = partToDo(plan, state, now)
  if (!part?.step || !part.pieces.every(piece => waitLeft(part.step!, piece, state, now) > 0)) return undefined
  const going = piecesGoingOn(plan, state)
  const isOpen = (step: RunStep) => going.some(piece => !isThrough(step, piece, state))
  const index = plan.steps.findIndex(step => isOnce(step) && isOpen(step))
  const step = plan.steps[index]
  // Not past a coat that is still to be laid from the cup that is full now.
  return step && index > Math.min(...partsOf(plan, state).map(each => each.index)) && !plan.steps.slice(0, index).some(each => each.kind === 'lay' && isOpen(each)) ? step : undefined
}
