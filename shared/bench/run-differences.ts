import { isWait, type WaitStep, waitSeconds } from './run-step'
import { isThrough, passesOn, piecesGoingOn, type RunPlan, type RunState } from './run-state'
import type { Look } from '#shared/picture/look'
import { type Coat, PASSES_MAX } from '#shared/scheme/coat'
import type { SchemeEdit } from '#shared/scheme/edits'

/** One thing the bench did otherwise than the revision, on most of its good pieces. */
export type Difference
  = | { what: 'passes', coatId: string, number: number, planned: number, done: number }
    | { what: 'thinning', coatId: string, number: number, planned: number, done: number }
    | { what: 'paint', coatId: string, number: number, from: string, to: string }
    /** Seconds; of a rest, a turn or a heat-set. */
    | { what: 'wait', coatId: string, number: number, kind: WaitStep['kind'], planned: number, done: number }

/** Pieces that show how it was meant: not set aside, and none that failed where one was looked at. */
export function goodPieces(plan: RunPlan, state: RunState): number[] {
  const going = piecesGoingOn(plan, state)
  const passed = going.filter(piece => state.inspected.get(piece)?.passed !== false)
  return passed.length > 0 ? passed : going
}

/** What most of them have; undefined of none. The lesser of two that are as common. */
function commonest(values: readonly number[]): number | undefined {
  const counts = new Map<number, number>()
  for (const value of values) counts.set(value, (counts.get(value) ?? 0) + 1)
  return [...counts].toSorted(([a, m], [b, n]) => n - m || a - b)[0]?.[0]
}

/**
 * What the bench did otherwise than the revision, coat by coat from the ground: passes that were laid, reducer and paints in the
 * cup, waits. Of each what most good pieces had, so that one piece that ran counts for nothing; a coat that is not yet done
 * on most of them says nothing.
 */
export function runDifferences(plan: RunPlan, state: RunState): Difference[] {
  const good = goodPieces(plan, state)
  const isMost = (pieces: readonly number[] | null) => good.filter(piece => pieces === null || pieces.includes(piece)).length * 2 > good.length
  const coats = new Map<string, { coat: Coat, number: number }>()
  for (const step of plan.steps) if (step.kind === 'lay') coats.set(step.coat.id, { coat: step.coat, number: step.number })

  return [...coats.values()].flatMap(({ coat, number }): Difference[] => {
    const about = { coatId: coat.id, number }
    const lays = plan.steps.filter(step => step.kind === 'lay' && step.coat.id === coat.id)
    const through = good.filter(piece => lays.every(step => isThrough(step, piece, state)))
    if (through.length * 2 <= good.length) return []
    const done = commonest(through.map(piece => passesOn(coat.id, piece, state)))
    const changes = state.cupChanges.filter(change => change.coatId === coat.id && isMost(change.pieces))
    const thinned = changes.findLast(change => change.how === 'thinned')
    const swaps = new Map(changes.flatMap(change => change.how === 'paint' ? [[change.from, change.to] as const] : []))
    return [
      ...done !== undefined && done > 0 && done !== coat.passes ? [{ what: 'passes' as const, ...about, planned: coat.passes, done: Math.min(done, PASSES_MAX) }] : [],
      ...thinned?.how === 'thinned' && thinned.reducer !== coat.mix.reducer ? [{ what: 'thinning' as const, ...about, planned: coat.mix.reducer, done: thinned.reducer }] : [],
      ...[...swaps].flatMap(([from, to]) => from !== to && coat.mix.parts.some(part => part.paintId === from) ? [{ what: 'paint' as const, ...about, from, to }] : []),
      ...plan.steps.filter(isWait).flatMap(step => step.coat.id === coat.id && step.kind !== 'cure' ? waitDifference(step, good, state, about) : []),
    ]
  })
}

function waitDifference(step: WaitStep, good: readonly number[], state: RunState, about: { coatId: string, number: number }): Difference[] {
  const planned = waitSeconds(step)
  const isFor = (piece: number) => (each: { stepId: string, pieces: readonly number[] | null }) => each.stepId === step.id && (each.pieces === null || each.pieces.includes(piece))
  const done = commonest(good.map((piece) => {
    const whole = state.waitSets.findLast(isFor(piece))?.seconds ?? planned
    return Math.max(0, whole - (state.waitCuts.findLast(isFor(piece))?.seconds ?? 0))
  }))
  return done === undefined || Math.abs(done - planned) < 1 ? [] : [{ what: 'wait', ...about, kind: step.kind, planned, done }]
}

/** The edits of a scheme that make it what the bench did. */
export function takeInEdits(differences: readonly Difference[], look: Pick<Look, 'body'>): SchemeEdit[] {
  const coats = new Map(look.body.stack.flatMap(item => item.act === 'coat' ? [[item.coat.id, item.coat] as const] : []))
  const mixes = new Map<string, Coat['mix']>()
  const edits: SchemeEdit[] = []
  for (const difference of differences) {
    const coat = coats.get(difference.coatId)
    if (!coat) continue
    const mix = mixes.get(coat.id) ?? coat.mix
    switch (difference.what) {
      case 'passes':
        edits.push({ do: 'set-passes', coatId: coat.id, passes: difference.done })
        break
      case 'thinning':
        mixes.set(coat.id, { ...mix, reducer: difference.done })
        break
      case 'paint':
        mixes.set(coat.id, { ...mix, parts: withPaint(mix.parts, difference.from, difference.to) })
        break
      case 'wait':
        edits.push({ do: 'change-coat', coatId: coat.id, change: waitChange(coat, difference) })
        break
    }
  }
  return [...edits, ...[...mixes].map(([coatId, mix]): SchemeEdit => ({ do: 'change-mix', coatId, mix }))]
}

/** Drop for drop; what is in the cup already takes the drops up. */
function withPaint(parts: Coat['mix']['parts'], from: string, to: string): Coat['mix']['parts'] {
  const drops = new Map<string, number>()
  for (const part of parts) {
    const paintId = part.paintId === from ? to : part.paintId
    drops.set(paintId, (drops.get(paintId) ?? 0) + part.drops)
  }
  return [...drops].map(([paintId, count]) => ({ paintId, drops: count }))
}

function waitChange(coat: Coat, { kind, done }: Extract<Difference, { what: 'wait' }>): Partial<Coat> {
  if (kind === 'heat') return { heatSet: coat.heatSet && done > 0 ? { ...coat.heatSet, seconds: done } : null }
  return { rest: Math.round(done / 6) / 10 }
}
