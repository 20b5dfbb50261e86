/** Conversions at the edge: inside, lengths are mm or µm, pressures bar, temperatures °C, volumes mL, masses g. */

/** Pascals in one bar: exact. */
const PA_PER_BAR = 100_000
/** Newtons in one pound-force: exact, 0.453 592 37 kg × 9.806 65 m/s². */
const N_PER_LBF = 0.453_592_37 * 9.806_65
/** Metres in one inch: exact. */
const M_PER_IN = 0.0254
/** mL in one US fluid ounce: exact, 231 in³ to the gallon of 128. */
const ML_PER_FL_OZ = 231 * 16.387_064 / 128
/** Grams in one ounce: exact. */
const G_PER_OZ = 28.349_523_125

const PSI_PER_BAR = PA_PER_BAR * M_PER_IN ** 2 / N_PER_LBF

/** bar to pounds-force a square inch: 1 bar is 14.5038 psi. */
export function barToPsi(bar: number): number {
  return bar * PSI_PER_BAR
}

/** Pounds-force a square inch to bar. */
export function psiToBar(psi: number): number {
  return psi / PSI_PER_BAR
}

/** mm to inches. */
export function mmToInches(mm: number): number {
  return mm / (M_PER_IN * 1000)
}

/** Inches to mm. */
export function inchesToMm(inches: number): number {
  return inches * M_PER_IN * 1000
}

/** µm to mil, thousandths of an inch. */
export function micrometresToMil(micrometres: number): number {
  return micrometres / (M_PER_IN * 1000)
}

/** mil to µm: 1 mil is 25.4 µm. */
export function milToMicrometres(mil: number): number {
  return mil * M_PER_IN * 1000
}

/** A temperature in °C to °F. */
export function celsiusToFahrenheit(celsius: number): number {
  return celsius * 9 / 5 + 32
}

/** A temperature in °F to °C. */
export function fahrenheitToCelsius(fahrenheit: number): number {
  return (fahrenheit - 32) * 5 / 9
}

/** mL to US fluid ounces. */
export function mlToFlOz(ml: number): number {
  return ml / ML_PER_FL_OZ
}

/** US fluid ounces to mL. */
export function flOzToMl(flOz: number): number {
  return flOz * ML_PER_FL_OZ
}

/** g to ounces. */
export function gramsToOunces(grams: number): number {
  return grams / G_PER_OZ
}

/** Ounces to g. */
export function ouncesToGrams(ounces: number): number {
  return ounces * G_PER_OZ
}
