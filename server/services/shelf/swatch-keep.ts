import type { StoredOptics } from '#shared/shelf/stored-optics'
import { paintSwatches } from '#shared/shelf/paint-swatches'
import type { PaintSwatches } from '#shared/shelf/paint-view'

/** Enough for the shelves of some fifty workshops; a swatch is about 300 bytes. */
const KEPT_MOST = 2000

/**
 * Swatches that were worked out, by the id of their optical data, the longest unused first. Optical data never changes, and the
 * engine does not change while the process runs, so nothing here can be stale. It can be thrown away at any time: a swatch
 * that is not here is worked out again, in about 7 ms.
 */
const kept = new Map<string, PaintSwatches>()

/** Swatches of stored optical data, worked out once. */
export function swatchesOf(opticsId: string, optics: StoredOptics): PaintSwatches {
  const swatches = kept.get(opticsId) ?? paintSwatches(optics)
  kept.delete(opticsId)
  kept.set(opticsId, swatches)
  for (const oldest of kept.keys()) {
    if (kept.size <= KEPT_MOST) break
    kept.delete(oldest)
  }
  return swatches
}
