import { Problem } from '#shared/errors/problem'
import type { PaintKnown } from '#shared/shelf/paint'
import { opticsOfKnown } from '#shared/shelf/optics-of-known'
import type { StoredOptics } from '#shared/shelf/stored-optics'

/** What the engine makes of what is known of a paint; what it cannot use is refused in words. */
export function deriveOptics(known: PaintKnown): StoredOptics {
  try {
    return opticsOfKnown(known)
  }
  catch (error) {
    if (error instanceof RangeError) throw new Problem({ code: 'paint/unknown-colour', reason: error.message })
    throw error
  }
}
