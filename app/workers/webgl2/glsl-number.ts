/** A number as GLSL writes it: never without a point. */
export function glsl(value: number): string {
  return Number.isInteger(value) ? value.toFixed(1) : String(value)
}
