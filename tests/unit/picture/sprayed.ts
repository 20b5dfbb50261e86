import type { DemoPaintName } from '#server/seed/paints'
import { bodyOf, BRUSH, coat, type CoatPlan, type InTheCup, type StackPlan } from '#server/seed/write-scheme'
import type { Look } from '#shared/picture/look'
import { perch } from '../../fixtures/demo-looks'

const IDS = new Map(perch.materials.paints.map(({ name, id }) => [name as DemoPaintName, id])) // named by the demo shelf

/** A blank of the perch's shape with nothing on it but these coats; no eye. */
export function sprayed(stack: StackPlan[]): Look {
  let count = 0
  const makeId = () => `00000009-0000-4000-8000-${(count++).toString(16).padStart(12, '0')}`
  const plan = { name: 'test', fish: 'perch', blank: 'Shad 80', iris: [60, 0, 0] as [number, number, number], stack, notes: ['', ''] as const, added: [] }
  return { ...perch, body: { ...bodyOf(plan, perch.materials.blank.id, IDS, makeId), eyes: null } }
}

/** A coat put on with a brush: without droplets, so that edges and fades can be measured. */
export const brushed = (cup: InTheCup, lays: number, more: Omit<CoatPlan, 'name' | 'cup' | 'lays'> = {}) => coat('laid', cup, lays, { tool: BRUSH, ...more })
