/** Writes a direction as a unit vector at place i of a list of triples. */
export function unitInto(list: Float32Array, i: number, x: number, y: number, z: number): void {
  const size = 1 / Math.sqrt(x * x + y * y + z * z)
  list[3 * i] = x * size
  list[3 * i + 1] = y * size
  list[3 * i + 2] = z * size
}
