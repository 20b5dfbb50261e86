import { PLANNING_VALUES } from '#shared/quantities/planning-values'
import { LABEL_CELSIUS, type Mixes, mixesFor } from '#shared/scheme/amounts/mixes'

/** The mixes of a run: planned for the room of the label, so that the steps of a run are the same in winter and summer. */
function mixesOfRun(pieces: number, potLifeMinutes: number, passes: number): Mixes {
  return mixesFor({ ...PLANNING_VALUES, room: LABEL_CELSIUS, pieces, potLifeMinutes, passes })
}

/** How many pieces one mix of a paint that sets can be laid on before it gels; at least 1. Pot life in minutes at 25 °C. */
export function piecesPerMix(potLifeMinutes: number, passes: number): number {
  return Math.max(1, mixesOfRun(1, potLifeMinutes, passes).piecesPerMix)
}

/**
 * Pieces 1 to `pieces` cut into mixes that are used up within the pot life, as even as they can be: first and last piece of each.
 * One range for what does not set.
 * @throws {RangeError} when pieces is not a whole number of at least 1
 */
export function mixBatches(pieces: number, potLifeMinutes: number | null, passes: number): [first: number, last: number][] {
  if (!Number.isInteger(pieces) || pieces < 1) throw new RangeError(`mixBatches: pieces must be a whole number of at least 1, got ${pieces}`)
  return potLifeMinutes === null ? [[1, pieces]] : mixesOfRun(pieces, potLifeMinutes, passes).batches.map(([first, last]) => [first, last])
}
