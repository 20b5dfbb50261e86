/** Share of the working time on the label that a mix is planned to be used within: the rest is for a warm room and a slow hand (common practice). */
const USABLE = 2 / 3
/** Minutes one pass of a setting clear takes on one piece, brushed or sprayed (common practice; a planning value). */
const MINUTES_PER_PASS = 2

/** How many pieces one mix of a paint that sets can be laid on before it gels; at least 1. Pot life in minutes at 25 °C. */
export function piecesPerMix(potLifeMinutes: number, passes: number): number {
  return Math.max(1, Math.floor(potLifeMinutes * USABLE / (MINUTES_PER_PASS * passes)))
}

/**
 * Pieces 1 to `pieces` cut into mixes that are used up within the pot life, as even as they can be: first and last piece of each.
 * One range for what does not set.
 * @throws {RangeError} when pieces is not a whole number of at least 1
 */
export function mixBatches(pieces: number, potLifeMinutes: number | null, passes: number): [first: number, last: number][] {
  if (!Number.isInteger(pieces) || pieces < 1) throw new RangeError(`mixBatches: pieces must be a whole number of at least 1, got ${pieces}`)
  const count = potLifeMinutes === null ? 1 : Math.ceil(pieces / piecesPerMix(potLifeMinutes, passes))
  return Array.from({ length: count }, (_, k) => [Math.floor(k * pieces / count) + 1, Math.floor((k + 1) * pieces / count)])
}
