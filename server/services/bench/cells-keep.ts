import { type AreaCells, areaCells } from '#shared/scheme/coat-area'
import type { BlankShape } from '#shared/blank/blank-shape'
import { prepareBlank } from '#shared/blank/prepared-blank'

/** Enough for the runs that are on benches at one time; a set of cells is about 1 MB. */
const KEPT_MOST = 24

/** Cells of blanks by the revision that froze them, the longest unused first. A revision never changes, so nothing here can be stale. */
const kept = new Map<string, AreaCells>()

/** The cells of a revision's blank, cut once. */
export function cellsOfRevision(revisionId: string, shape: BlankShape): AreaCells {
  const cells = kept.get(revisionId) ?? areaCells(prepareBlank(shape))
  kept.delete(revisionId)
  kept.set(revisionId, cells)
  for (const oldest of kept.keys()) {
    if (kept.size <= KEPT_MOST) break
    kept.delete(oldest)
  }
  return cells
}
