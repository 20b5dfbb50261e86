import { type Quantity, unitOf, type UnitChoices } from './quantities'

/** Two figures nearer than this share of themselves are one figure that went through a conversion. */
const SAME = 1e-9
/** Decimals somebody may have typed. */
const TYPED_PLACES = 5

const isSame = (a: number, b: number) => Math.abs(a - b) <= SAME * Math.max(Math.abs(a), Math.abs(b), 1e-3)

/** The short decimal that a figure is, but for the dust of a conversion; null when it is none. */
function shortDecimal(value: number): number | null {
  for (let places = 0; places <= TYPED_PLACES; places++) {
    const rounded = Number(value.toFixed(places))
    if (isSame(rounded, value)) return rounded
  }
  return null
}

/**
 * A kept figure in the unit chosen, ready to be typed over: what was typed in that unit comes back as it was typed; what was
 * typed in another is rounded to the usual places.
 */
export function toShown(kept: number, quantity: Quantity, choices: UnitChoices): number {
  const { fromKept, places } = unitOf(quantity, choices)
  const value = fromKept(kept)
  return shortDecimal(value) ?? Number(value.toFixed(places))
}

/** A figure in the unit chosen as it is kept: exact, and without the dust of a conversion where it is a short figure of its own. */
export function toKept(shown: number, quantity: Quantity, choices: UnitChoices): number {
  const value = unitOf(quantity, choices).toKept(shown)
  return shortDecimal(value) ?? value
}

/** A figure to so many digits, without zeros nobody reads: whole from there on. */
export function toDigits(value: number, digits = 3): string {
  if (value === 0) return '0'
  return Math.abs(value) >= 10 ** digits ? value.toFixed(0) : String(Number(value.toPrecision(digits)))
}

/** Digits up to which a figure is for reading; more are for working it out again. */
const READING = 3

/** A kept figure to read, to three digits (or as many as asked) and no finer than its unit is usually told, and its unit; money to the hundredth. */
export function readable(kept: number, quantity: Quantity, choices: UnitChoices, digits = 3): { value: string, unit: string } {
  const { fromKept, sign, places } = unitOf(quantity, choices)
  if (quantity === 'money') return { value: kept.toFixed(2), unit: sign }
  const figure = toDigits(fromKept(kept), digits)
  const coarse = Number(Number(figure).toFixed(places))
  return { value: digits <= READING && coarse !== 0 ? String(coarse) : figure, unit: sign }
}
