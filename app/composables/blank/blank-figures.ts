import type { BlankShape } from '#shared/blank/blank-shape'

/** A blank in a few words: its length, and what hangs on it. */
export function blankFigures(shape: BlankShape): string {
  const parts = [
    `${Number(shape.length.toFixed(1))} mm`,
    ...shape.joints.length > 0 ? [`${shape.joints.length + 1} parts`] : [],
    ...shape.lip ? ['with a lip'] : [],
    shape.hangers.length === 1 ? '1 hook' : `${shape.hangers.length} hooks`,
  ]
  return parts.join(', ')
}
