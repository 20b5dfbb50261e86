import type { PaintKnown } from './paint'

/** Whether two say the same of a paint's colour, in whatever order; a figure left out is not a figure of 0. */
export function isSameKnown(one: PaintKnown, other: PaintKnown): boolean {
  return written(one) === written(other)
}

function written(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(written).join()}]`
  if (typeof value !== 'object' || value === null) return String(value)
  const fields = Object.entries(value).filter(([, field]) => field !== undefined).sort(([a], [b]) => a < b ? -1 : 1)
  return `{${fields.map(([name, field]) => `${name}:${written(field)}`).join()}}`
}
