import { randomUUID } from 'node:crypto'
import { DEMO_PAINTS, type DemoPaintName } from './paints'
import type { Coat, Gun, Tool, Where } from '#shared/scheme/coat'
import type { Mark } from '#shared/scheme/mark'
import type { Mask, MaskForm } from '#shared/scheme/mask'
import type { Eyes, Ground, SchemeBody, StackItem } from '#shared/scheme/body'
import type { Lab } from '#shared/shelf/paint'

/** What goes into the cup: one paint, or paints with their drops. */
export type InTheCup = DemoPaintName | readonly (readonly [DemoPaintName, number])[]

export interface CoatPlan {
  name: string
  cup: InTheCup
  /** How much is to lie in the end, in passes at the paints' usual thinning; thinning makes up what whole passes cannot. */
  lays: number
  gun?: readonly [angle: number, footprint: number]
  tool?: Tool
  where?: Partial<Where>
  marks?: Mark[]
  heat?: boolean
  note?: string
  rest?: number
}

/** A finish of the demo workshop, written before it has paints to point at. */
export interface DemoScheme {
  name: string
  fish: string
  /** Label of the built-in blank. */
  blank: string
  ground?: Ground
  iris: Lab
  stack: StackPlan[]
  /** The note of its first revision, and of its second. */
  notes: readonly [string, string]
  /** Names of coats that revision 1 did not have yet. */
  added: readonly string[]
}

/** A mask of a plan; its fit and its lift name the same one. */
type MaskPlan = Omit<Mask, 'id'>

export type StackPlan
  = { act: 'coat', plan: CoatPlan }
    | { act: 'fit', mask: MaskPlan }
    | { act: 'lift', mask: MaskPlan }

/** Gives a new id for every coat and mask that a plan is written into. */
type MakeId = () => string

const BASSWOOD: Ground = { name: 'Sealed basswood', colour: [74, 7, 24], finish: 'matt' }
const AIRBRUSH: Tool = { kind: 'airbrush', nozzle: 0.35, pressure: 1.4, distance: 12 }
export const FINE: Tool = { kind: 'airbrush', nozzle: 0.2, pressure: 0.8, distance: 4 }
export const THROUGH_MESH: Tool = { kind: 'airbrush', nozzle: 0.3, pressure: 1, distance: 8 }
const FLAKES: Tool = { kind: 'airbrush', nozzle: 0.5, pressure: 1.9, distance: 15 }
export const BRUSH: Tool = { kind: 'brush' }
const EYE: Omit<Eyes, 'iris'> = { pupil: [6, 0, 0], rim: [20, 2, 6] }

/** A coat of the plan. */
export function coat(name: string, cup: InTheCup, lays: number, more: Omit<CoatPlan, 'name' | 'cup' | 'lays'> = {}): StackPlan {
  return { act: 'coat', plan: { name, cup, lays, ...more } }
}

/** A mask with everything laid while it is on. */
export function under(name: string, seed: number, form: MaskForm, coats: StackPlan[]): StackPlan[] {
  const mask: MaskPlan = { name, form, seed, fromMaskId: null }
  return [{ act: 'fit', mask }, ...coats, { act: 'lift', mask }]
}

/** A mesh with the pitch and thread of its maker's card, mm. */
export function mesh(weave: 'hexagon' | 'diamond' | 'square', pitch: number, thread: number): MaskForm {
  return { kind: 'mesh', weave, pitch, thread, angle: 0, stretch: 1, follow: 0.7, lift: 0.15 }
}

/** Paint on every fin, or on one, from root to tip. */
export const allFins = (root = 1, tip = 1): Where['fins'] => [{ fin: 'all', root, tip, on: 'whole' }]

/** The epoxy that ends every demo finish. */
export const EPOXY = coat('Epoxy clear', 'Slow epoxy clear', 2, {
  tool: BRUSH, where: { fins: allFins() }, rest: 720, note: 'Turn until it no longer marks a glove, then overnight.',
})

const DROPS = 10

/** Drops for the cup and reducer such that whole passes lay what the plan asks. */
function mixFor(plan: CoatPlan, paintIds: ReadonlyMap<DemoPaintName, string>): Pick<Coat, 'mix' | 'passes'> {
  const parts = typeof plan.cup === 'string' ? [[plan.cup, DROPS] as const] : plan.cup
  const drops = parts.reduce((sum, [, n]) => sum + n, 0)
  const usual = parts.reduce((sum, [name, n]) => sum + (DEMO_PAINTS[name].reducerPer100 ?? 0) / 100 * n, 0) / drops
  const passes = Math.max(1, Math.ceil(plan.lays - 0.05))
  const reducer = Math.max(0, Math.round(((1 + usual) * passes / plan.lays - 1) * drops))
  return {
    passes,
    mix: { parts: parts.map(([name, n]) => ({ paintId: paintIds.get(name)!, drops: n })), reducer },
  }
}

/** The plan as a coat, with the shelf's paints. */
function coatOf(plan: CoatPlan, paintIds: ReadonlyMap<DemoPaintName, string>, id: string): Coat {
  const gun: Gun = plan.gun ? { aim: 'from', angle: plan.gun[0], footprint: plan.gun[1] } : { aim: 'all over' }
  const first = typeof plan.cup === 'string' ? plan.cup : plan.cup[0]![0]
  return {
    id,
    name: plan.name,
    ...mixFor(plan, paintIds),
    tool: plan.tool ?? (DEMO_PAINTS[first].known.how === 'flake' ? FLAKES : AIRBRUSH),
    gun,
    where: { body: true, zones: [], reach: 0, edge: 'fades', fins: [], ...plan.where },
    marks: plan.marks ?? [],
    rest: plan.rest ?? DEMO_PAINTS[first].restMinutes ?? 5,
    heatSet: plan.heat ? { seconds: 40, distance: 40 } : null,
    note: plan.note ?? '',
  }
}

/** The stack of a plan, from the ground up. */
function stackOf(plans: readonly StackPlan[], paintIds: ReadonlyMap<DemoPaintName, string>, makeId: MakeId): Pick<SchemeBody, 'stack' | 'masks'> {
  const maskIds = new Map(plans.flatMap(item => item.act === 'fit' ? [[item.mask, makeId()] as const] : []))
  const stack = plans.map((item): StackItem => item.act === 'coat'
    ? { act: 'coat', coat: coatOf(item.plan, paintIds, makeId()) }
    : { act: item.act, maskId: maskIds.get(item.mask)! })
  return { stack, masks: [...maskIds].map(([mask, id]) => ({ id, ...mask })) }
}

/** A finish of the demo workshop on a blank and a shelf that are there; the same ids make the same body. */
export function bodyOf(plan: DemoScheme, blankId: string, paintIds: ReadonlyMap<DemoPaintName, string>, makeId: MakeId = randomUUID): SchemeBody {
  return { format: 1, blankId, ground: plan.ground ?? BASSWOOD, eyes: { iris: plan.iris, ...EYE }, ...stackOf(plan.stack, paintIds, makeId) }
}
