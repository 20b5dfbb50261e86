import { z } from 'zod'
import * as convert from './units'

/** The units one can choose between, by what is measured; the first of each is the metric one. */
export const UNIT_CHOICES = {
  length: ['mm', 'in'],
  volume: ['mL', 'fl oz'],
  mass: ['g', 'oz'],
  pressure: ['bar', 'psi', 'kPa'],
  temperature: ['°C', '°F'],
} as const

/** What units can be chosen for. */
export type Measured = keyof typeof UNIT_CHOICES
export const MEASURED = Object.keys(UNIT_CHOICES) as Measured[]

/** The unit of everything that is measured. */
export const UnitChoices = z.object({
  length: z.enum(UNIT_CHOICES.length),
  volume: z.enum(UNIT_CHOICES.volume),
  mass: z.enum(UNIT_CHOICES.mass),
  pressure: z.enum(UNIT_CHOICES.pressure),
  temperature: z.enum(UNIT_CHOICES.temperature),
})
export type UnitChoices = z.output<typeof UnitChoices>

/** Units chosen one by one, over a whole system. */
export const OwnUnits = UnitChoices.partial()
export type OwnUnits = z.output<typeof OwnUnits>

/** Two systems in one press. */
export const UNIT_SYSTEMS = {
  metric: { length: 'mm', volume: 'mL', mass: 'g', pressure: 'bar', temperature: '°C' },
  inch: { length: 'in', volume: 'fl oz', mass: 'oz', pressure: 'psi', temperature: '°F' },
} as const satisfies Record<string, UnitChoices>
export type UnitSystem = keyof typeof UNIT_SYSTEMS

/** A system with what was chosen otherwise. */
export function unitChoices(system: UnitSystem, own: OwnUnits = {}): UnitChoices {
  return { ...UNIT_SYSTEMS[system], ...own }
}

/** One unit: its sign, and the way there and back from what is kept. */
export interface Unit {
  sign: string
  /** Decimal places it is usually shown to, and by how much one press of plus changes it. */
  places: number
  step: number
  toKept: (shown: number) => number
  fromKept: (kept: number) => number
}

const same = (value: number) => value
const by = (sign: string, places: number, step: number, factor: number): Unit =>
  ({ sign, places, step, toKept: shown => shown / factor, fromKept: kept => kept * factor })
const kept = (sign: string, places: number, step: number): Unit => ({ sign, places, step, toKept: same, fromKept: same })

const MM_PER_CM = 10
/** kPa in one bar: exact. */
const KPA_PER_BAR = 100

const CHOSEN = {
  'mm': kept('mm', 2, 0.1),
  'in': { sign: 'in', places: 3, step: 0.005, toKept: convert.inchesToMm, fromKept: convert.mmToInches },
  'mL': kept('mL', 2, 0.25),
  'fl oz': { sign: 'fl oz', places: 3, step: 0.01, toKept: convert.flOzToMl, fromKept: convert.mlToFlOz },
  'g': kept('g', 2, 0.1),
  'oz': { sign: 'oz', places: 3, step: 0.01, toKept: convert.ouncesToGrams, fromKept: convert.gramsToOunces },
  'bar': kept('bar', 2, 0.1),
  'psi': { sign: 'psi', places: 1, step: 1, toKept: convert.psiToBar, fromKept: convert.barToPsi },
  'kPa': by('kPa', 0, 10, KPA_PER_BAR),
  '°C': kept('°C', 1, 1),
  '°F': { sign: '°F', places: 1, step: 1, toKept: convert.fahrenheitToCelsius, fromKept: convert.celsiusToFahrenheit },
} as const satisfies Record<UnitChoices[Measured], Unit>

/** Everything a figure can be of: what is measured, what follows from it, and what has no unit to choose. */
export const QUANTITIES = [
  'length', 'volume', 'mass', 'pressure', 'temperature',
  'distance', 'film', 'area', 'temperature step', 'density', 'film volume', 'count', 'drops', 'share', 'percent', 'minutes', 'money', 'price',
] as const
export type Quantity = typeof QUANTITIES[number]

/**
 * The unit a quantity is shown in. What is kept: lengths mm, distances cm, films µm, areas cm², volumes mL, masses g,
 * pressures bar, temperatures °C, densities g/mL, mL of film to one cm² of one µm, and prices of one mL.
 */
export function unitOf(quantity: Quantity, choices: UnitChoices): Unit {
  switch (quantity) {
    case 'length': case 'volume': case 'mass': case 'pressure': case 'temperature': return CHOSEN[choices[quantity]]
    case 'distance': return choices.length === 'mm' ? kept('cm', 1, 0.5) : { ...CHOSEN.in, places: 2, step: 0.25, toKept: shown => convert.inchesToMm(shown) / MM_PER_CM, fromKept: cm => convert.mmToInches(cm * MM_PER_CM) }
    case 'film': return choices.length === 'mm' ? kept('µm', 1, 0.5) : { sign: 'mil', places: 2, step: 0.02, toKept: convert.milToMicrometres, fromKept: convert.micrometresToMil }
    case 'area': return choices.length === 'mm' ? kept('cm²', 1, 1) : by('in²', 2, 0.1, convert.mmToInches(MM_PER_CM) ** 2)
    case 'temperature step': return choices.temperature === '°C' ? kept('°C', 1, 1) : by('°F', 1, 1, 9 / 5)
    case 'density': return by(`${choices.mass}/${choices.volume}`, 3, 0.01, CHOSEN[choices.mass].fromKept(1) / CHOSEN[choices.volume].fromKept(1))
    case 'film volume': {
      const [area, film] = [unitOf('area', choices), unitOf('film', choices)]
      return by(`${choices.volume}/(${area.sign} · ${film.sign})`, 6, 0, CHOSEN[choices.volume].fromKept(1) / (area.fromKept(1) * film.fromKept(1)))
    }
    case 'count': case 'share': case 'money': return kept('', 2, 1)
    case 'drops': return kept('drops', 0, 1)
    case 'price': return by(`a ${choices.volume}`, 3, 0.01, 1 / CHOSEN[choices.volume].fromKept(1))
    case 'percent': return kept('%', 1, 1)
    case 'minutes': return kept('min', 1, 1)
  }
}
