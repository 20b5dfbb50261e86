import type { DeviationKind, RunAct, RunEvent } from './run-event'
import { isFor, isWait, type RunStep } from './run-step'

/** What a run is made of. */
export interface RunPlan { steps: readonly RunStep[], pieces: number }

/** A wait that began for some pieces. */
export interface Wait { eventId: string, stepId: string, pieces: readonly number[] | null, at: string, byHand: boolean }

/** Something done differently from the revision. */
export interface Deviation { eventId: string, stepId: string, what: DeviationKind, note: string, pieces: readonly number[] | null, at: string }

/** A word about some pieces, by the act that said it; null stands for all pieces of the run. */
interface Said { eventId: string, pieces: readonly number[] | null, at: string }

/** A wait that takes another time than its step says, or was cut short; seconds. */
export interface WaitChange extends Said { stepId: string, seconds: number }

/** A cup that was mixed otherwise: reduced otherwise, or with another paint in place of one. */
export type CupChange = Said & { coatId: string } & ({ how: 'thinned', reducer: number } | { how: 'paint', from: string, to: string })

/** A photo taken at the bench. */
export interface BenchPhoto extends Said { photoId: string, stepId: string }

/** What is known of a run at one moment. Pieces that are null stand for all of the run. */
export interface RunState {
  /** Which pieces are through with which step. */
  done: ReadonlyMap<string, { pieces: ReadonlySet<number> | 'all', at: string }>
  /** Passes laid, by coat and piece. */
  laid: ReadonlyMap<string, ReadonlyMap<number, number>>
  waits: readonly Wait[]
  /** Waits made longer or shorter, the latest word last. */
  waitSets: readonly WaitChange[]
  /** Waits that were not waited out, with what was left of them. */
  waitCuts: readonly WaitChange[]
  cupChanges: readonly CupChange[]
  photos: readonly BenchPhoto[]
  /** Pieces set aside, with the reason. */
  aside: ReadonlyMap<number, string>
  inspected: ReadonlyMap<number, { passed: boolean, note: string }>
  deviations: readonly Deviation[]
  finishedAt: string | null
}

/** Why an act cannot belong to this run, or null when it can. Only its own words are checked, never the order of arrival. */
export function refusalOf(plan: RunPlan, act: RunAct): string | null {
  const knows = (id: string | undefined) => id === undefined || plan.steps.some(step => step.id === id)
  switch (act.kind) {
    case 'pass-laid':
      if (!hasCoat(plan, act.coatId)) return NO_COAT
      return piecesRefusal(plan, act.pieces)
    case 'step-done':
      return knows(act.stepId) && knows(act.starts) ? piecesRefusal(plan, act.pieces) : NO_STEP
    case 'wait-started':
    case 'wait-cut':
    case 'deviation':
    case 'photo-taken':
      return knows(act.stepId) ? piecesRefusal(plan, act.pieces) : NO_STEP
    case 'wait-set':
      if (!plan.steps.some(step => step.id === act.stepId && isWait(step))) return NO_STEP
      return piecesRefusal(plan, act.pieces)
    case 'thinned':
    case 'paint-changed':
      if (!hasCoat(plan, act.coatId)) return NO_COAT
      return piecesRefusal(plan, act.pieces)
    case 'bottle-used':
      return act.coatId === undefined || hasCoat(plan, act.coatId) ? null : NO_COAT
    case 'piece-set-aside':
    case 'piece-taken-up':
      return piecesRefusal(plan, [act.piece])
    case 'inspected':
      return piecesRefusal(plan, act.pieces)
    case 'run-finished':
    case 'taken-back':
      return null
  }
}

const NO_STEP = 'This revision has no such step.'
const NO_COAT = 'This revision has no such coat.'

function hasCoat(plan: RunPlan, coatId: string): boolean {
  return plan.steps.some(step => step.kind === 'lay' && step.coat.id === coatId)
}

function piecesRefusal(plan: RunPlan, pieces: readonly number[] = []): string | null {
  return pieces.every(piece => piece <= plan.pieces) ? null : `This run has ${plan.pieces} pieces.`
}

const earlier = (a: string | undefined, b: string) => a !== undefined && a < b ? a : b

/** An act, with the time on the server's clock once the server has it. */
export type DoneAct = RunEvent & { at?: string }

/** When an act was done: on the server's clock where that is known, else on the tablet's. */
export function timeOf({ at, doneAt }: DoneAct): string {
  return at ?? doneAt
}

/**
 * Works out where a run stands from its acts, in whatever order they arrived: every order gives the same. The same act twice
 * counts once, an act taken back counts as if it had never been. Where one word replaces another (set aside and taken up,
 * looked at again) the one stands that was said knowing of the other; of two tablets that knew nothing of each other, the one
 * with the higher place, then the greater id.
 */
export function runState(events: readonly DoneAct[]): RunState {
  const standing = standingActs(events).sort(inPlace)
  const done = new Map<string, { pieces: Set<number> | 'all', at: string }>()
  const laid = new Map<string, Map<number, number>>()
  const waits: Wait[] = []
  const aside = new Map<number, string>()
  const inspected = new Map<number, { passed: boolean, note: string }>()
  const deviations: Deviation[] = []
  const waitSets: WaitChange[] = []
  const waitCuts: WaitChange[] = []
  const cupChanges: CupChange[] = []
  const photos: BenchPhoto[] = []
  let finishedAt: string | null = null

  for (const event of standing) {
    const { id, act } = event
    const doneAt = timeOf(event)
    const said = (pieces: readonly number[] | undefined): Said => ({ eventId: id, pieces: pieces ?? null, at: doneAt })
    switch (act.kind) {
      case 'pass-laid': {
        const pieces = laid.get(act.coatId) ?? new Map<number, number>()
        for (const piece of new Set(act.pieces)) pieces.set(piece, (pieces.get(piece) ?? 0) + act.passes)
        laid.set(act.coatId, pieces)
        break
      }
      case 'step-done': {
        const known = done.get(act.stepId)
        const pieces = act.pieces === undefined || known?.pieces === 'all' ? 'all' : new Set([...known?.pieces ?? [], ...act.pieces])
        done.set(act.stepId, { pieces, at: earlier(known?.at, doneAt) })
        if (act.starts !== undefined) waits.push({ eventId: id, stepId: act.starts, pieces: act.pieces ?? null, at: doneAt, byHand: false })
        break
      }
      case 'wait-started':
        waits.push({ eventId: id, stepId: act.stepId, pieces: act.pieces ?? null, at: doneAt, byHand: true })
        break
      case 'wait-set':
        waitSets.push({ ...said(act.pieces), stepId: act.stepId, seconds: act.seconds })
        break
      case 'wait-cut':
        waitCuts.push({ ...said(act.pieces), stepId: act.stepId, seconds: act.secondsLeft })
        break
      case 'thinned':
        cupChanges.push({ ...said(act.pieces), how: 'thinned', coatId: act.coatId, reducer: act.reducer })
        break
      case 'paint-changed':
        cupChanges.push({ ...said(act.pieces), how: 'paint', coatId: act.coatId, from: act.from, to: act.to })
        break
      case 'photo-taken':
        photos.push({ ...said(act.pieces), photoId: act.photoId, stepId: act.stepId })
        break
      case 'deviation':
        deviations.push({ eventId: id, stepId: act.stepId, what: act.what, note: act.note, pieces: act.pieces ?? null, at: doneAt })
        break
      case 'piece-set-aside':
        aside.set(act.piece, act.reason)
        break
      case 'piece-taken-up':
        aside.delete(act.piece)
        break
      case 'inspected':
        for (const piece of act.pieces) inspected.set(piece, { passed: act.passed, note: act.note })
        break
      case 'run-finished':
        finishedAt = earlier(finishedAt ?? undefined, doneAt)
        break
      case 'bottle-used': // counts for the stock only: see paint-used.ts
      case 'taken-back':
        break
    }
  }
  return { done, laid, waits: waits.sort(byTime), waitSets, waitCuts, cupChanges, photos, aside, inspected, deviations: deviations.sort(byTime), finishedAt }
}

/** Orders acts as they were done, the same on every tablet: by place; those of before that have none first, by their clock; then by id. */
export function inPlace(a: RunEvent, b: RunEvent): number {
  const [left, right] = [a.place ?? 0, b.place ?? 0]
  if (left !== right) return left - right
  if (left === 0 && a.doneAt !== b.doneAt) return a.doneAt < b.doneAt ? -1 : 1
  return a.id < b.id ? -1 : a.id > b.id ? 1 : 0
}

const byTime = (a: { at: string, eventId: string }, b: { at: string, eventId: string }) => a.at.localeCompare(b.at) || a.eventId.localeCompare(b.eventId)

/** The acts that stand: each once, without take-backs and what they took back. */
export function standingActs<E extends RunEvent>(events: readonly E[]): E[] {
  const gone = new Set(events.flatMap(({ act }) => act.kind === 'taken-back' ? [act.eventId] : []))
  return events.filter(({ id, act }) => {
    if (act.kind === 'taken-back' || gone.has(id)) return false
    gone.add(id)
    return true
  })
}

/** Pieces that go on: all but those set aside. */
export function piecesGoingOn(plan: Pick<RunPlan, 'pieces'>, state: Pick<RunState, 'aside'>): number[] {
  return Array.from({ length: plan.pieces }, (_, i) => i + 1).filter(piece => !state.aside.has(piece))
}

/** Whether a piece is through with a step, or the step is not for it. */
export function isThrough(step: RunStep, piece: number, state: Pick<RunState, 'done'>): boolean {
  const pieces = state.done.get(step.id)?.pieces
  return !isFor(step, piece) || pieces === 'all' || pieces?.has(piece) === true
}

/** Passes of a coat on one piece. */
export function passesOn(coatId: string, piece: number, state: Pick<RunState, 'laid'>): number {
  return state.laid.get(coatId)?.get(piece) ?? 0
}
