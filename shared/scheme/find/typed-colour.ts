import { readColour } from '#shared/shelf/read-colour'
import type { Lab } from '#shared/shelf/paint'

/** Three figures with decimal commas, parted by spaces or semicolons: 52,3 −8,1 24. */
const WITH_COMMAS = /^((?:lab\s*)?\(?)\s*([-+]?\d+(?:[.,]\d+)?)(\s*;\s*|\s+)([-+]?\d+(?:[.,]\d+)?)(?:\s*;\s*|\s+)([-+]?\d+(?:[.,]\d+)?)\s*(\)?)$/i

/**
 * A wanted colour as a painter types it: CIELAB (D65) as three figures, decimal points or commas, or a CSS colour.
 *
 * @returns null for what is no colour
 */
export function typedColour(typed: string): Lab | null {
  const text = typed.trim().replace(/[−–]/g, '-')
  const three = WITH_COMMAS.exec(text)
  return readColour(three ? [three[2]!, three[4]!, three[5]!].map(figure => figure.replace(',', '.')).join(' ') : text)
}
