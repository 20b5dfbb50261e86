/** The arithmetic of film and paint; each published relation with its source. */

function atLeastZero(value: number, what: string): void {
  if (!(value >= 0)) throw new RangeError(`${what} must be ≥ 0, got ${value}`)
}

function aboveZero(value: number, what: string): void {
  if (!(value > 0)) throw new RangeError(`${what} must be > 0, got ${value}`)
}

/**
 * Spreading rate without loss, m² for each litre: 10·VS/DFT.
 * @param solids volume solids, percent, 0…100
 * @param film dry film, µm, > 0
 * @source Tech Note 5.3, Handy calculations
 */
export function spreadingRate(solids: number, film: number): number {
  atLeastZero(solids, 'spreadingRate: solids')
  aboveZero(film, 'spreadingRate: film')
  return 10 * solids / film
}

/**
 * Wet film that dries to a film, µm: 100·DFT/VS.
 * @param film dry film, µm, ≥ 0
 * @param solids volume solids, percent, > 0
 * @source Tech Note 5.3, Handy calculations
 */
export function wetFilm(film: number, solids: number): number {
  atLeastZero(film, 'wetFilm: film')
  aboveZero(solids, 'wetFilm: solids')
  return 100 * film / solids
}

/** Volume solids after reducing, in the unit given: VS/(1 + r), r parts of reducer to one part of paint. */
export function reducedSolids(solids: number, reducerPerPart: number): number {
  atLeastZero(solids, 'reducedSolids: solids')
  atLeastZero(reducerPerPart, 'reducedSolids: reducer')
  return solids / (1 + reducerPerPart)
}

/** Reducer as a share of the whole mix: 25 parts to 100 of paint are 0.2 of it. */
export function reducerShare(partsPer100: number): number {
  atLeastZero(partsPer100, 'reducerShare: parts')
  return partsPer100 / (100 + partsPer100)
}

/**
 * Paint that has to leave the airbrush, mL: A·DFT·10⁻⁴/(VS·TE).
 * @param area cm², ≥ 0
 * @param film dry film, µm, ≥ 0
 * @param solids volume solids, share, 0…1
 * @param transfer share of the solids that stays on the piece, 0…1
 */
export function sprayedVolume(area: number, film: number, solids: number, transfer: number): number {
  atLeastZero(area, 'sprayedVolume: area')
  atLeastZero(film, 'sprayedVolume: film')
  aboveZero(solids, 'sprayedVolume: solids')
  aboveZero(transfer, 'sprayedVolume: transfer')
  return area * film * 1e-4 / (solids * transfer)
}

/**
 * Passes until the paint hides `target` of what is below, if each pass hides a share of what is still seen: ln(1−target)/ln(1−share).
 * Not rounded; both between 0 and 1, open.
 */
export function passesToHide(share: number, target = 0.98): number {
  if (!(share > 0 && share < 1) || !(target > 0 && target < 1)) throw new RangeError(`passesToHide: shares lie between 0 and 1, got ${share}, ${target}`)
  return Math.log(1 - target) / Math.log(1 - share)
}
