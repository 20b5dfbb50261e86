import { z } from 'zod'

const Share = z.number().min(0.01).max(1)

/** What a workshop plans with: figures nobody can read off a label, that differ from bench to bench. */
export const PlanningValues = z.object({
  /** Share of the solids that stays on the piece, by tool. */
  transfer: z.object({ airbrush: Share, brush: Share, sponge: Share, dip: Share }),
  /** Left in cup and lines for each load, mL of mix. */
  cupLoss: z.number().min(0).max(100),
  /** Drops that make one mL. */
  dropsPerMl: z.number().min(5).max(100),
  /** The room where it is mixed, °C. */
  room: z.number().min(0).max(45),
  /** Minutes one pass of what sets takes on one piece. */
  minutesPerPass: z.number().min(0.1).max(240),
  /** How many times faster a mix sets for each 10 °C more. */
  setsFaster: z.number().min(1).max(3),
  /** Share of the pot life a mix is planned to be used within. */
  usable: z.number().min(0.1).max(1),
})
export type PlanningValues = z.output<typeof PlanningValues>

/** Planning values that somebody knows better than the usual. */
export const OwnPlanning = PlanningValues.extend({ transfer: PlanningValues.shape.transfer.partial() }).partial()
export type OwnPlanning = z.output<typeof OwnPlanning>

/**
 * Where nobody knows better, all common practice: an airbrush on a narrow body keeps 15 to 35 % on it, a cup keeps 0.5 to 1 mL
 * back, 20 drops make a mL, a mix sets twice as fast 10 °C warmer (data sheets say 1.5 to 2.5), and a third of the pot life is
 * left to a warm room and a slow hand. Weigh, count and time to learn your own.
 */
export const PLANNING_VALUES: PlanningValues = {
  transfer: { airbrush: 0.25, brush: 0.9, sponge: 0.8, dip: 0.9 },
  cupLoss: 0.75,
  dropsPerMl: 20,
  room: 21,
  minutesPerPass: 2,
  setsFaster: 2,
  usable: 2 / 3,
}

/** The usual values under those that are known better, the last named first. */
export function planWith(...known: readonly OwnPlanning[]): PlanningValues {
  return known.reduce<PlanningValues>((so, own) => ({ ...so, ...own, transfer: { ...so.transfer, ...own.transfer } }), PLANNING_VALUES)
}
