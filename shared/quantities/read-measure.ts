import { toKept } from './shown-figure'
import { MEASURED, type Quantity, UNIT_CHOICES, type UnitChoices, unitOf } from './quantities'

/** Other ways people write a unit. */
const WRITTEN: Readonly<Record<string, string>> = {
  '"': 'in', '″': 'in', 'inch': 'in', 'inches': 'in', 'ml': 'mL', 'cc': 'mL', 'floz': 'fl oz', 'flozs': 'fl oz', 'gram': 'g', 'grams': 'g',
  'ounce': 'oz', 'ounces': 'oz', 'bars': 'bar', 'kpa': 'kPa', 'c': '°C', '°c': '°C', 'f': '°F', '°f': '°F', 'um': 'µm', 'μm': 'µm', 'µm': 'µm',
  'thou': 'mil', 'mils': 'mil', 'min': 'min', 'minutes': 'min', '%': '%',
}

/** A number as people write it, or null: a decimal comma is a point, a fraction is what it comes to (1 1/2, 3/8). */
export function readNumber(typed: string): number | null {
  const text = typed.trim().replace(/[\u2212\u2013]/g, '-')
  const fraction = /^(-?)(?:(\d+)\s+)?(\d+)\s*\/\s*(\d+)$/.exec(text)
  if (fraction) {
    const value = Number(fraction[2] ?? 0) + Number(fraction[3]) / Number(fraction[4])
    return Number.isFinite(value) ? (fraction[1] ? -value : value) : null
  }
  return /^[+-]?(?:\d+[.,]?\d*|[.,]\d+)$/.test(text) ? Number(text.replace(',', '.')) : null
}

/** Every choice of units in which a quantity reads differently, the chosen first. */
function ways(choices: UnitChoices): UnitChoices[] {
  return [choices, ...MEASURED.flatMap(measured => UNIT_CHOICES[measured].map(unit => ({ ...choices, [measured]: unit })))]
}

/**
 * What was typed, as it is kept, or null when it is no figure of that quantity. A unit behind it counts before the chosen one:
 * "13 psi" is 13 psi wherever it is typed.
 */
export function readMeasure(typed: string, quantity: Quantity, choices: UnitChoices): number | null {
  const [, figure = '', written = ''] = /^(.*?[\d.,])\s*([^\d.,]*)$/.exec(typed.trim()) ?? []
  const value = readNumber(figure)
  if (value === null) return null
  const name = written.trim().toLowerCase().replace(/\s+/g, '')
  if (name === '') return toKept(value, quantity, choices)
  const sign = WRITTEN[name] ?? name
  const way = ways(choices).find(each => unitOf(quantity, each).sign.toLowerCase().replace(/\s+/g, '') === sign.toLowerCase().replace(/\s+/g, ''))
  return way ? toKept(value, quantity, way) : null
}
