function polynomial(x: number, coefficients: readonly number[]): number {
  return coefficients.reduceRight((sum, c) => sum * x + c, 0)
}

function within(name: string, value: number, low: number, high: number): void {
  if (!(value >= low && value <= high)) throw new RangeError(`${name} is given from ${low} to ${high}`)
}

/** Density of air-free fresh water, kg/m³, 0-40 °C, within 0.001. Tanaka et al., Metrologia 38 (2001) 301. */
export function waterDensity_Tanaka2001(celsius: number): number {
  within('the density of water, °C,', celsius, 0, 40)
  const t = celsius
  return 999.97495 * (1 - (t - 3.983035) ** 2 * (t + 301.797) / (522528.9 * (t + 69.34881)))
}

/** Density of air-free fresh water, kg/m³, 0-150 °C. Kell, J. Chem. Eng. Data 20 (1975) 97. Differs from Tanaka by about 0.003. */
export function waterDensity_Kell1975(celsius: number): number {
  within('the density of water, °C,', celsius, 0, 150)
  const top = polynomial(celsius, [999.83952, 16.945176, -7.9870401e-3, -46.170461e-6, 105.56302e-9, -280.54253e-12])
  return top / (1 + 16.87985e-3 * celsius)
}

/**
 * Density of sea water at the surface, kg/m³: practical salinity 0-42, 0-40 °C, within 0.01.
 * International equation of state, EOS-80 (UNESCO Technical Papers in Marine Science 36, 1981).
 */
export function seaWaterDensity_EOS80(salinity: number, celsius: number): number {
  within('salinity', salinity, 0, 42)
  within('the density of sea water, °C,', celsius, -2, 40)
  const fresh = polynomial(celsius, [999.842594, 6.793952e-2, -9.09529e-3, 1.001685e-4, -1.120083e-6, 6.536332e-9])
  const first = polynomial(celsius, [0.824493, -4.0899e-3, 7.6438e-5, -8.2467e-7, 5.3875e-9])
  const second = polynomial(celsius, [-5.72466e-3, 1.0227e-4, -1.6546e-6])
  return fresh + first * salinity + second * salinity ** 1.5 + 4.8314e-4 * salinity ** 2
}
