import type { SchemeDiff } from '#shared/scheme/diff'

/** How many things differ: each coat, mask, the ground, the eyes and the blank once. */
export function changeCount(diff: SchemeDiff): number {
  const coats = new Set([
    ...diff.added.map(coat => coat.id), ...diff.takenOut.map(coat => coat.id), ...diff.moved.map(move => move.coatId), ...diff.changed.map(change => change.coatId),
  ])
  const masks = new Set([
    ...diff.masksAdded.map(mask => mask.id), ...diff.masksTakenOut.map(mask => mask.id), ...diff.masksChanged.map(change => change.maskId), ...diff.masksSpanned.map(span => span.maskId),
  ])
  return coats.size + masks.size + [diff.ground, diff.eyes, diff.blankId].filter(each => each !== null).length
}
