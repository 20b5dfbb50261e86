import type { Quantity } from '#shared/quantities/quantities'

/** Something a figure was worked out from. */
export interface Input {
  symbol: string
  what: string
  value: number
  quantity: Quantity
}

/** A number with how it was worked out: its formula in symbols holds in whatever units its inputs are shown. */
export interface Figure {
  value: number
  quantity: Quantity
  formula: string
  inputs: readonly Input[]
}

/** Something a figure is worked out from, as its formula names it. */
export function given(symbol: string, what: string, value: number, quantity: Quantity = 'count'): Input {
  return { symbol, what, value, quantity }
}

/** mL in one cm² of film of one µm: exact. */
export const ML_PER_CM2_UM = 1e-4

/** The room a film takes, as an input: it turns with the units. */
export const FILM_ROOM = given('c', 'room of so much area at so much film', ML_PER_CM2_UM, 'film volume')
