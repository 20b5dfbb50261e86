import type { Lab } from '#shared/shelf/paint'

/** What a second look at a stack warns of. */
export const SECOND_LOOKS = [
  'candy-over-dark', 'interference-over-pale', 'pearl-unseen', 'fluorescent-over-dark',
  'clear-over-damp', 'solvent-over-fresh', 'thick-for-a-day', 'lifted-early', 'mesh-filled', 'paint-retired', 'paint-gone',
] as const
export type SecondLook = typeof SECOND_LOOKS[number]

/** One warning: it stops nothing, and can be answered. */
export interface Finding {
  look: SecondLook
  /** The coat it is about. */
  coatId: string
  /** Says all that the warning rests on: while that stands, an answer to it stands. */
  key: string
  /** What is so, and why it matters; one sentence each, in the trade's words. */
  says: string
  why: string
}

/** What lies under a coat where most of it lies, as the engine sees it. */
export interface GroundUnder {
  coatId: string
  below: Lab
  /** How far the coat changes it, CIEDE2000, where it changes it most. */
  change: number
}

/** A paint as it stands on the shelf today. */
export interface PaintToday { id: string, retired: boolean, /** mL */ volumeLeft: number }
