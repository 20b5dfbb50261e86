import { cupOf } from './cup-of'
import type { PaintSnapshot } from '#shared/scheme/materials'

/** What decides whether a paint can be picked up now. */
export interface Stock { id: string, retired: boolean, volumeLeft: number }

/** A paint that a coat can be found with: as the engine takes it, with the cup it may share. */
export interface Candidate { id: string, optics: PaintSnapshot['optics'], cup: string }

/**
 * The paints to look through. Clears and sealers lay no colour. Put-away paints and empty bottles are left out unless asked
 * for; a paint of whose stock nothing is known counts as there.
 */
export function candidates(paints: readonly PaintSnapshot[], stock: readonly Stock[], withAbsent: boolean): Candidate[] {
  const known = new Map(stock.map(each => [each.id, each]))
  return paints
    .filter(paint => paint.kind !== 'clear' && paint.kind !== 'sealer')
    .filter(({ id }) => {
      const here = known.get(id)
      return withAbsent || !here || (!here.retired && here.volumeLeft > 0)
    })
    .map(paint => ({ id: paint.id, optics: paint.optics, cup: cupOf(paint) }))
}
