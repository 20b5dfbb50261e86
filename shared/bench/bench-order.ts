import { isFor, isWait, type RunStep, waitSeconds } from './run-step'
import { waitLeft } from './run-parts'
import { isThrough, passesOn, piecesGoingOn, type RunPlan, type RunState } from './run-state'

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

/** A run in the middle: where it stands, at a moment of the clock, ms. */
export interface Standing { state: RunState, now: number }

/** Where a piece stands in the plan, and from when it may go on, minutes. */
interface Place { piece: number, next: number, free: number }

/** Longest that paint which does not set stands mixed in an open cup before it is laid, minutes: it skins and settles (common practice). */
const STANDS_MINUTES = 30

/** Keeps the books of an order while it is made. */
class Book {
  clock = 0
  idle = 0
  end = 0
  readonly at: Place[]

  constructor(readonly plan: RunPlan, readonly from?: Standing) {
    const pieces = from ? piecesGoingOn(plan, from.state) : Array.from({ length: plan.pieces }, (_, n) => n + 1)
    this.at = pieces.map(piece => ({ piece, next: 0, free: 0 }))
    for (const one of this.at) {
      this.begin(one)
      this.pass(one)
    }
  }

  /** Whether a step is still to be done to a piece. */
  isOpen(step: RunStep, piece: number): boolean {
    return this.from ? !isThrough(step, piece, this.from.state) : isFor(step, piece)
  }

  /** A piece that is in the middle of a wait has only the rest of it before it. */
  private begin(one: Place): void {
    if (!this.from) return
    const { steps } = this.plan
    const found = steps.findIndex(step => this.isOpen(step, one.piece))
    one.next = found < 0 ? steps.length : found
    const step = steps[one.next]
    if (!step || !isWait(step) || step.kind === 'heat') return
    one.free = waitLeft(step, one.piece, this.from.state, this.from.now) / 60_000
    one.next++
  }

  /** Lets a piece go past what is not for it, what is done for all at once, and what only takes time. */
  pass(one: Place): void {
    for (;;) {
      const step = this.plan.steps[one.next]
      if (!step) break
      if (this.isOpen(step, one.piece) && !isOnce(step)) {
        if (handMinutes(step).each > 0) break
        one.free += restMinutes(step)
      }
      one.next++
    }
    this.end = Math.max(this.end, one.free)
  }

  /**
   * From when a cup may be filled, minutes: what sets only when all its pieces are there to be laid, other paint not long before
   * the first of them is. What else is done once may be done at any time.
   */
  filledFrom(step: RunStep, index: number): number {
    if (step.kind !== 'mix' && step.kind !== 'test') return 0
    const own = this.at.filter(one => this.isOpen(step, one.piece))
    if (step.kind === 'mix' && step.potLifeMinutes !== null) return Math.max(...own.map(one => one.next < index ? Infinity : one.free))
    return Math.min(...own.map(one => one.free)) - STANDS_MINUTES
  }

  /** How long the hands are on a piece at a step, minutes: passes that are on it already are not laid again. */
  minutes(step: RunStep, piece: number): number {
    const { each } = handMinutes(step)
    if (!this.from || step.kind !== 'lay') return each
    return each * Math.max(0, 1 - passesOn(step.coat.id, piece, this.from.state) / step.coat.passes)
  }

  do(step: RunStep, piece: number | null, minutes: number, notBefore: number): Doing {
    const from = Math.max(this.clock, notBefore)
    this.idle += from - this.clock
    this.clock = from + minutes
    this.end = Math.max(this.end, this.clock)
    return { step, piece, from, to: this.clock }
  }
}

/** Things the hands do, one after the other, by the rule of `benchOrder`. */
function* inOrder(book: Book): Generator<Doing, void> {
  const { steps } = book.plan
  const once = steps.flatMap((step, index) => isOnce(step) && book.at.some(one => book.isOpen(step, one.piece)) ? [index] : [])
  for (let done = 0; ;) {
    const next = once[done]
    const step = next === undefined ? undefined : steps[next]
    const limit = next ?? steps.length
    const open = book.at.filter(one => one.next < limit)
    if (step) {
      // What is done once for all waits for every piece that is laid from the cup before it, and for no rest.
      const isCupFree = open.every(one => !steps.slice(one.next, limit).some(each => each.kind === 'lay' && book.isOpen(each, one.piece)))
      const from = book.filledFrom(step, limit)
      if (isCupFree && from <= Math.max(book.clock, ...open.length > 0 ? [Math.min(...open.map(one => one.free))] : [Infinity])) {
        yield book.do(step, null, handMinutes(step).once, from)
        done++
        continue
      }
    }
    if (open.length === 0) return
    const now = open.filter(one => one.free <= book.clock)
    const one = now.length > 0
      ? now.reduce((a, b) => b.next < a.next || (b.next === a.next && b.free < a.free) ? b : a)
      : open.reduce((a, b) => b.free < a.free || (b.free === a.free && b.next < a.next) ? b : a)
    const own = steps[one.next]!
    yield book.do(own, one.piece, book.minutes(own, one.piece), one.free)
    one.free = book.clock
    one.next++
    book.pass(one)
  }
}

/**
 * The order of work for one pair of hands that wastes least waiting, from the start or from where a run stands, by a greedy
 * rule: of what can be done now, first the airbrush (clean out, mix and set for the next coat, while pieces rest), then the
 * piece that may go on and stands furthest behind, of those the one that has waited longest; when nothing can be done, wait for
 * the piece that is free first. Colour by colour: a cup is emptied only when every piece has had its coats, and what sets in the
 * cup is mixed only when its pieces are there. Greedy is not always the best there is, and is never longer than doing each step
 * on all pieces and then waiting (checked).
 *
 * With one coat of t minutes a piece and a rest of F, N pieces take max(N·t, t + F) a coat, as the trade reckons.
 */
export function benchOrder(plan: RunPlan, from?: Standing): BenchOrder {
  const book = new Book(plan, from)
  const doings = [...inOrder(book)]
  return { doings, end: book.end, idle: book.idle }
}

/** The first thing in the order of work from where a run stands; undefined when there is nothing left for the hands. */
export function nextDoing(plan: RunPlan, from: Standing): Doing | undefined {
  const { value } = inOrder(new Book(plan, from)).next()
  return value ?? undefined
}

/** The order nobody should work in: each step on all pieces, then everybody waits until the last of them has rested. */
export function stepByStep(plan: RunPlan): BenchOrder {
  const book = new Book(plan)
  const doings: Doing[] = []
  let free = 0
  for (const step of plan.steps) {
    const { once, each } = handMinutes(step)
    const pieces = book.at.filter(one => isFor(step, one.piece))
    if (once > 0) doings.push(book.do(step, null, once, free))
    else if (each > 0) for (const one of pieces) doings.push(book.do(step, one.piece, each, free))
    free = Math.max(free, book.clock) + restMinutes(step)
    book.end = Math.max(book.end, free)
  }
  return { doings, end: book.end, idle: book.idle }
}
