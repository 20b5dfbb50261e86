import fc from 'fast-check'
import type { Air, Tablet } from './tablet'
import type { RunAct } from '#shared/bench/run-event'

/** Pieces of the model's runs. */
export const PIECES = 4

/** What may happen, on one of the tablets. */
export type Happening
  = | { what: 'do', tablet: number, acts: readonly RunAct[] }
    /** Takes back one of the acts this tablet knows of. */
    | { what: 'take back', tablet: number, pick: number }
    | { what: 'air', tablet: number, air: Air }
    | { what: 'full', tablet: number, isFull: boolean }
    | { what: 'clock', tablet: number, by: number }
    | { what: 'kill' | 'flush' | 'wait' | 'hear' | 'arrive', tablet: number }
    /** Nothing is done while so many small things go on: where a kill falls is decided by them. */
    | { what: 'pause', ticks: number }

const anyPieces = fc.integer({ min: 1, max: 2 ** PIECES - 1 }).map(bits => Array.from({ length: PIECES }, (_, n) => n + 1).filter(n => bits & 2 ** (n - 1)))
const anyPiece = fc.integer({ min: 1, max: PIECES })

/** Acts of every kind that a tablet can do by itself; among them some that cannot be of the run. */
export function anyAct(coatIds: readonly string[], stepIds: readonly string[], waitIds: readonly string[]): fc.Arbitrary<RunAct> {
  const coatId = fc.constantFrom(...coatIds)
  const stepId = fc.constantFrom(...stepIds)
  const waitId = fc.constantFrom(...waitIds)
  const v = 1 as const
  return fc.oneof(
    { weight: 5, arbitrary: fc.tuple(coatId, anyPieces, fc.integer({ min: 1, max: 3 })).map(([coat, pieces, passes]): RunAct => ({ v, kind: 'pass-laid', coatId: coat, pieces, passes })) },
    { weight: 4, arbitrary: fc.tuple(stepId, fc.option(anyPieces, { nil: undefined })).map(([step, pieces]): RunAct => ({ v, kind: 'step-done', stepId: step, pieces })) },
    { weight: 2, arbitrary: fc.tuple(anyPiece, fc.boolean()).map(([piece, up]): RunAct => up ? { v, kind: 'piece-taken-up', piece } : { v, kind: 'piece-set-aside', piece, reason: 'ran' }) },
    { weight: 2, arbitrary: fc.tuple(anyPieces, fc.boolean()).map(([pieces, passed]): RunAct => ({ v, kind: 'inspected', pieces, passed, note: '' })) },
    { weight: 1, arbitrary: fc.tuple(coatId, fc.integer({ min: 0, max: 9 })).map(([coat, reducer]): RunAct => ({ v, kind: 'thinned', coatId: coat, reducer })) },
    { weight: 1, arbitrary: fc.tuple(waitId, fc.integer({ min: 0, max: 600 })).map(([step, seconds]): RunAct => ({ v, kind: 'wait-set', stepId: step, seconds })) },
    { weight: 1, arbitrary: fc.constant<RunAct>({ v, kind: 'run-finished' }) },
    { weight: 1, arbitrary: fc.constant<RunAct>({ v, kind: 'piece-set-aside', piece: 99, reason: 'of no run' }) },
    { weight: 1, arbitrary: stepId.map((step): RunAct => ({ v, kind: 'deviation', stepId: step, what: 'other', note: UNREADABLE })) },
  )
}

/** A note by which the model's server cannot read an act. */
export const UNREADABLE = 'not to be read'

/** Any order of happenings on so many tablets. */
export function anySchedule(act: fc.Arbitrary<RunAct>, tablets: number, maxLength: number): fc.Arbitrary<Happening[]> {
  const tablet = fc.nat(tablets - 1)
  return fc.array(fc.oneof(
    { weight: 8, arbitrary: fc.record({ what: fc.constant('do' as const), tablet, acts: fc.array(act, { minLength: 1, maxLength: 2 }) }) },
    { weight: 2, arbitrary: fc.record({ what: fc.constant('take back' as const), tablet, pick: fc.nat(50) }) },
    { weight: 5, arbitrary: fc.record({ what: fc.constant('air' as const), tablet, air: fc.constantFrom<Air[]>('there', 'there', 'gone', 'answer lost', 'twice', 'late', 'signed out', 'refusing') }) },
    { weight: 1, arbitrary: fc.record({ what: fc.constant('full' as const), tablet, isFull: fc.boolean() }) },
    { weight: 1, arbitrary: fc.record({ what: fc.constant('clock' as const), tablet, by: fc.integer({ min: -7_200_000, max: 7_200_000 }) }) },
    { weight: 9, arbitrary: fc.record({ what: fc.constantFrom('kill' as const, 'flush' as const, 'wait' as const, 'hear' as const, 'hear' as const, 'arrive' as const), tablet }) },
    { weight: 6, arbitrary: fc.record({ what: fc.constant('pause' as const), ticks: fc.integer({ min: 1, max: 12 }) }) },
  ), { maxLength })
}

/** Lets one thing happen. */
export async function happen(tablets: readonly Tablet[], it: Happening): Promise<void> {
  if (it.what === 'pause') {
    for (let n = 0; n < it.ticks; n++) await Promise.resolve()
    return
  }
  const tablet = tablets[it.tablet]!
  switch (it.what) {
    case 'do': return tablet.do(it.acts)
    case 'take back': {
      const known = tablet.known.filter(event => event.act.kind !== 'taken-back')
      const gone = known[it.pick % Math.max(1, known.length)]
      return gone && tablet.do([{ v: 1, kind: 'taken-back', eventId: gone.id }])
    }
    case 'air':
      tablet.air = it.air
      return
    case 'full':
      tablet.isFull = it.isFull
      return
    case 'clock':
      tablet.clock.now += it.by
      return
    case 'kill': return tablet.kill()
    case 'flush': return tablet.flush()
    case 'wait': return tablet.wait()
    case 'hear': return tablet.hear()
    case 'arrive': return tablet.arrive()
  }
}
