/** Where the working time on a label was read, °C. */
export const LABEL_CELSIUS = 25
/** The step that `setsFaster` is told for, °C. */
export const STEP_CELSIUS = 10

/**
 * Working time of a mix in a room, minutes: L · f^((25 − T) / 10). A big or deep cup sets sooner: mix small and shallow.
 * @param label minutes at 25 °C, > 0
 * @param celsius the room
 * @param setsFaster how many times faster it sets 10 °C warmer, ≥ 1; planning value 2
 * @source Controlling exotherm; How epoxy pot life changes with temperature
 */
export function potLifeAt(label: number, celsius: number, setsFaster = 2): number {
  if (!(label > 0)) throw new RangeError(`potLifeAt: minutes must be > 0, got ${label}`)
  if (!(setsFaster >= 1)) throw new RangeError(`potLifeAt: the factor must be at least 1, got ${setsFaster}`)
  return label * setsFaster ** ((LABEL_CELSIUS - celsius) / STEP_CELSIUS)
}

/** How what sets is cut into mixes. */
export interface Mixes {
  /** Working time in the room, minutes. */
  potLife: number
  /** The part of it a mix is planned to be used within, minutes. */
  usableMinutes: number
  /** Minutes it takes on one piece. */
  minutesPerPiece: number
  /** Pieces one mix reaches for: 0 when a single piece takes longer than a mix lasts. */
  piecesPerMix: number
  /** First and last piece of each mix, as even as they can be; a piece each when none can be finished in time. */
  batches: readonly (readonly [first: number, last: number])[]
}

/** What the cutting into mixes is worked out from. */
export interface MixesGiven {
  pieces: number
  /** Pot life at 25 °C, minutes. */
  potLifeMinutes: number
  passes: number
  room: number
  setsFaster: number
  minutesPerPass: number
  usable: number
}

/**
 * Pieces 1 to N cut into mixes of which none outlives its pot life at the room's temperature.
 * @throws {RangeError} when pieces is not a whole number of at least 1
 */
export function mixesFor({ pieces, potLifeMinutes, passes, room, setsFaster, minutesPerPass, usable }: MixesGiven): Mixes {
  if (!Number.isInteger(pieces) || pieces < 1) throw new RangeError(`mixesFor: pieces must be a whole number of at least 1, got ${pieces}`)
  const potLife = potLifeAt(potLifeMinutes, room, setsFaster)
  const usableMinutes = potLife * usable
  const minutesPerPiece = minutesPerPass * passes
  const piecesPerMix = Math.floor(usableMinutes / minutesPerPiece)
  const count = Math.ceil(pieces / Math.max(1, piecesPerMix))
  const batches = Array.from({ length: count }, (_, k) => [Math.floor(k * pieces / count) + 1, Math.floor((k + 1) * pieces / count)] as const)
  return { potLife, usableMinutes, minutesPerPiece, piecesPerMix, batches }
}
