import { builtInBlank } from '#shared/blank/built-in-blanks'
import type { RunAct, RunEvent } from '#shared/bench/run-event'
import { runSteps } from '#shared/bench/run-steps'
import type { RunPlan } from '#shared/bench/run-state'
import type { Look } from '#shared/picture/look'
import type { Eyes, StackItem } from '#shared/scheme/body'
import type { Coat } from '#shared/scheme/coat'
import type { PaintSnapshot } from '#shared/scheme/materials'
import { newSchemeBody } from '#shared/scheme/new-scheme'
import { coat, id, mask, paint } from '../scheme/bodies'

export { coat, id, mask, paint }

const EYES: Eyes = { iris: [60, 20, 60], pupil: [5, 0, 0], rim: [20, 0, 0] }

/** A clear that sets in the cup: two-part epoxy, half an hour. */
export const EPOXY = paint(9, { name: 'Epoxy clear', kind: 'clear', base: 'epoxy', potLifeMinutes: 30, hazards: ['H315', 'H317', 'H319', 'H411'] })
export const SOLVENT = paint(7, { name: 'Solvent black', base: 'solvent', hazards: ['H225', 'H336'] })
export const PEARL = paint(8, { name: 'Pearl', kind: 'pearl', optics: { ...paint(8).optics, kind: 'flake' } })

/** A coat of one paint. */
export function coatOf(n: number, what: PaintSnapshot, more: Partial<Coat> = {}): Coat {
  return coat(n, { name: `Coat ${n}`, mix: { parts: [{ paintId: what.id, drops: 20 }], reducer: 5 }, ...more })
}

const item = (row: Coat | string): StackItem => typeof row === 'string'
  ? { act: row.startsWith('+') ? 'fit' : 'lift', maskId: id('mask', Number(row.slice(1))) }
  : { act: 'coat', coat: row }

/** A finish from the ground up: coats, '+1' fits mask 1, '-1' lifts it. */
export function finish(rows: readonly (Coat | string)[], { eyes = false } = {}): Look {
  const masks = [...new Set(rows.filter(row => typeof row === 'string').map(row => Number(row.slice(1))))].map(n => mask(n))
  return {
    body: { ...newSchemeBody(id('blank', 1)), stack: rows.map(item), masks, eyes: eyes ? EYES : null },
    materials: { paints: [paint(1), paint(2), SOLVENT, PEARL, EPOXY], blank: { id: id('blank', 1), shape: builtInBlank('minnow-90') } },
  }
}

/** A finish with everything in it: a base, a mesh over a pearl, a solvent coat heat-set, eyes and an epoxy clear on the turner. */
export const PERCH = finish([
  coatOf(1, paint(1), { passes: 3, rest: 6 }),
  '+1',
  coatOf(2, PEARL, { passes: 2, rest: 5 }),
  '-1',
  coatOf(3, SOLVENT, { passes: 2, rest: 10, heatSet: { seconds: 40, distance: 40 } }),
  coatOf(4, EPOXY, { passes: 1, rest: 480, tool: { kind: 'brush' } }),
], { eyes: true })

/** A run of that finish, with the few steps of the first form: what is tried on it is not about the others. */
export function planOf(look: Look, pieces: number): RunPlan {
  return { steps: runSteps(look, pieces, { form: 1, madeOf: null }), pieces }
}

/** A moment of the day, minutes past nine. */
export const at = (minutes: number) => new Date(Date.UTC(2026, 10, 12, 9, 0, 0) + minutes * 60_000).toISOString()

/** An act with an id of its own. */
export function event(n: number, act: RunAct, minutes = n): RunEvent {
  return { id: `eeeeeeee-0000-4000-8000-${String(n).padStart(12, '0')}`, doneAt: at(minutes), act }
}
