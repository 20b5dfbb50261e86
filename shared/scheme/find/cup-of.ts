import type { PaintBase } from '#shared/shelf/paint'

/**
 * Which cup a paint may go into: paints of one base share one, thinned with one reducer. Water and solvent never meet in a
 * cup (they curdle), nor do two-part, moisture-curing, epoxy or UV paints with anything of another base. Common practice;
 * what the makers say of mixing their own paints comes first.
 */
export function cupOf({ base }: { base: PaintBase }): string {
  return base
}

/** Whether all of some paints may share one cup. */
export function mayShareCup(paints: readonly { base: PaintBase }[]): boolean {
  return new Set(paints.map(cupOf)).size <= 1
}
