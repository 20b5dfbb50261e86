/** Bands of a picture. */
export const BANDS = 16
/** Levels of a deposit code. */
export const LEVELS = 256

/** Fills the levels between worked-out ones, every `step` and the last, on straight lines. */
export function fillBetween(array: Float32Array, width: number, step: number): void {
  for (let from = 0; from < LEVELS - 1; from += step) {
    const to = Math.min(LEVELS - 1, from + step)
    for (let level = from + 1; level < to; level++) {
      const share = (level - from) / (to - from)
      for (let i = 0; i < width; i++) {
        array[level * width + i] = array[from * width + i]! * (1 - share) + array[to * width + i]! * share
      }
    }
  }
}
