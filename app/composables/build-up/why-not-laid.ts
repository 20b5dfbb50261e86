import type { BuildUpSequence } from '#shared/scheme/build-up'
import { listWords } from '#shared/scheme/coat-words'
import type { Materials } from '#shared/scheme/materials'
import { usedPaintIds } from '#shared/scheme/used-materials'

/** Why coats cannot be laid with what is on the shelf, as a sentence; undefined when they can. */
export function whyNotLaid(sequence: Pick<BuildUpSequence, 'stack'>, { paints }: Pick<Materials, 'paints'>, names: readonly { id: string, name: string }[]): string | undefined {
  const missing = usedPaintIds(sequence).filter(id => !paints.some(paint => paint.id === id))
  if (missing.length === 0) return undefined
  const words = missing.map(id => names.find(paint => paint.id === id)?.name).filter(name => name !== undefined)
  return words.length > 0 ? `Bring ${listWords(words.map(name => `“${name}”`))} back to the shelf first.` : 'One of its paints is no longer on the shelf.'
}
