/** A figure of a drawing to a hundredth of a millimetre: engines differ in the last bit of a sine, and what the server drew must be what the browser draws. */
export function toHundredth(value: number): number {
  return Math.round(value * 100) / 100
}

/** A box as the `viewBox` of a drawing, widened by a rim on every side, mm. */
export function viewBoxRound({ x, y, width, height }: { x: number, y: number, width: number, height: number }, rim: number): string {
  return [x - rim, y - rim, width + 2 * rim, height + 2 * rim].map(toHundredth).join(' ')
}
