import { type Coat, COAT_NOTE_MAX, PASSES_MAX, type Where } from '#shared/scheme/coat'
import type { PaintSnapshot } from '#shared/scheme/materials'
import { newCoat } from '#shared/scheme/new-coat'

/** What a search came up with, as far as the cup and the airbrush are concerned. */
export interface Proposed { parts: readonly { id: string, drops: number }[], passes: number }

/** A cup as it is usually filled: so many drops that the reducer comes out in whole drops too. */
const CUP_DROPS = 20

/**
 * The coat a proposal stands for, ready to be laid: its drops in proportion, each paint's usual reducer, so that a pass lays
 * the film that was promised, and the tool of the paint there is most of.
 *
 * @param restOf minutes a paint rests
 * @returns null when a paint of it is not among `paints`
 */
export function proposedCoat(id: string, { parts, passes }: Proposed, where: Where, paints: readonly PaintSnapshot[], restOf: (paintId: string) => number, note = ''): Coat | null {
  const cup = parts.flatMap(part => paints.filter(paint => paint.id === part.id).map(paint => ({ paint, drops: part.drops })))
  const main = [...cup].sort((a, b) => b.drops - a.drops)[0]
  if (!main || cup.length < parts.length) return null
  const total = cup.reduce((sum, { drops }) => sum + drops, 0)
  const times = Math.max(1, Math.round(CUP_DROPS / total))
  const reducer = cup.reduce((sum, { paint, drops }) => sum + times * drops * paint.reducerPer100 / 100, 0)
  return {
    ...newCoat(id, main.paint, Math.max(...cup.map(({ paint }) => restOf(paint.id)))),
    mix: { parts: cup.map(({ paint, drops }) => ({ paintId: paint.id, drops: times * drops })), reducer: Math.round(reducer) },
    where,
    passes: Math.min(PASSES_MAX, Math.max(1, Math.round(passes))),
    note: note.trim().slice(0, COAT_NOTE_MAX),
  }
}
