import { mixedDensity } from './two-part'
import type { Coat } from '../coat'
import type { Materials, PaintSnapshot } from '../materials'

/** g/mL; reducers of water-based paints are mostly water (common practice). */
export const REDUCER_DENSITY = 1

/** What goes into the cup of a coat, in the ratio of its drops. */
export interface Cup {
  parts: { paint: PaintSnapshot, share: number }[]
  /** Parts of reducer to one of paint. */
  reducerPerPart: number
  /** Volume solids before reducing, share. */
  solids: number
  /** g/mL, before reducing. */
  density: number
  /** Shortest pot life of what is in it at 25 °C, minutes; null for what does not set. */
  potLifeMinutes: number | null
}

/** Density of a paint as it is laid, g/mL: of resin and hardener together where both are known. */
export function densityOf(paint: PaintSnapshot): number {
  return (paint.twoPart && mixedDensity(paint.twoPart)) ?? paint.density
}

/** The cup of a coat; null when none of its paints is known. */
export function cupOf({ mix }: Pick<Coat, 'mix'>, materials: Pick<Materials, 'paints'>): Cup | null {
  const known = mix.parts.flatMap(({ paintId, drops }) => {
    const paint = materials.paints.find(each => each.id === paintId)
    return paint ? [{ paint, drops }] : []
  })
  if (known.length === 0) return null
  const drops = known.reduce((sum, part) => sum + part.drops, 0)
  const parts = known.map(({ paint, drops: own }) => ({ paint, share: own / drops }))
  const lives = parts.flatMap(({ paint }) => paint.potLifeMinutes ?? [])
  return {
    parts,
    reducerPerPart: mix.reducer / mix.parts.reduce((sum, part) => sum + part.drops, 0),
    solids: parts.reduce((sum, { paint, share }) => sum + share * paint.volumeSolids / 100, 0),
    density: parts.reduce((sum, { paint, share }) => sum + share * densityOf(paint), 0),
    potLifeMinutes: lives.length > 0 ? Math.min(...lives) : null,
  }
}
