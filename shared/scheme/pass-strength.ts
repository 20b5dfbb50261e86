import type { Coat } from './coat'
import type { Materials } from './materials'

/**
 * How much film one pass of a coat lays, against a pass of its paints as they are usually reduced:
 * (1 + r₀)/(1 + r), r₀ the usual parts of reducer to one of paint (mean of the paints by drops), r the parts in the cup.
 * 1 as usual, less when thinner; 0 with no paint in the cup. A paint the materials do not know counts as usually not reduced.
 */
export function passStrength(coat: Pick<Coat, 'mix'>, materials: Pick<Materials, 'paints'>): number {
  const { parts, reducer } = coat.mix
  const drops = parts.reduce((sum, part) => sum + part.drops, 0)
  if (drops === 0) return 0
  const usual = parts.reduce((sum, part) => {
    const paint = materials.paints.find(one => one.id === part.paintId)
    return sum + part.drops * (paint?.reducerPer100 ?? 0) / 100
  }, 0) / drops
  return (1 + usual) / (1 + reducer / drops)
}

/** Passes of a coat counted in passes of its paints as usually reduced: what its film, colour and amount follow. */
export function effectivePasses(coat: Pick<Coat, 'mix' | 'passes'>, materials: Pick<Materials, 'paints'>): number {
  return coat.passes * passStrength(coat, materials)
}
