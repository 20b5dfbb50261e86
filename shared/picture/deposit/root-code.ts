/** Where paint lies in one view: one byte per sample and the largest value it stands for. */
export interface DepositMap {
  /** One per view sample; x = peak · (code / 255)². */
  codes: Uint8Array
  /** Deposit of code 255, in passes per effective pass of the coat; 0 for a coat that lies nowhere here. */
  peak: number
}

/**
 * Deposits as bytes, finest where the eye is: steps even in the root. `dither` holds a share in [0, 1) for
 * every sample, so that levels leave no bands; what is zero stays zero.
 */
export function rootCoded(deposit: Float32Array, dither: Float32Array): DepositMap {
  const count = deposit.length
  const codes = new Uint8Array(count)
  let peak = 0
  for (let i = 0; i < count; i++) {
    const x = deposit[i] ?? 0
    if (x > peak) peak = x
  }
  if (peak <= 0) return { codes, peak: 0 }
  const gain = 255 / Math.sqrt(peak)
  for (let i = 0; i < count; i++) {
    const x = deposit[i] ?? 0
    if (x > 0) codes[i] = Math.min(255, Math.sqrt(x) * gain + (dither[i] ?? 0))
  }
  return { codes, peak }
}

/** The deposit a byte of a map stands for, in passes per effective pass. */
export const depositOf = (map: DepositMap, sample: number) => map.peak * ((map.codes[sample] ?? 0) / 255) ** 2
