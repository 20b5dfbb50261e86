/** Radius of the wire rings of a blank, centre line, mm (common practice: larger wire on larger baits). */
export function ringRadius(length: number): number {
  return Math.min(2, Math.max(1.25, length / 75))
}
