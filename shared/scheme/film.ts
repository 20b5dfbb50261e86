import type { SchemeBody } from './body'
import type { Coat } from './coat'
import type { Materials } from './materials'
import { effectivePasses } from './pass-strength'
import { coatsOf } from './stack-order'

/** Film of one pass of a cup as its paints are usually reduced, µm: the paints' planning values, by drops. */
export function filmOfPass(coat: Pick<Coat, 'mix'>, materials: Pick<Materials, 'paints'>): number {
  const drops = coat.mix.parts.reduce((sum, part) => sum + part.drops, 0)
  if (drops === 0) return 0
  return coat.mix.parts.reduce((sum, part) => {
    const paint = materials.paints.find(each => each.id === part.paintId)
    return sum + part.drops / drops * (paint?.filmPerPass ?? 0)
  }, 0)
}

/** Dry film a coat leaves where it is laid in full, µm: passes × strength of a pass × film of a pass. An estimate from planning values. */
export function filmOfCoat(coat: Pick<Coat, 'mix' | 'passes'>, materials: Pick<Materials, 'paints'>): number {
  return effectivePasses(coat, materials) * filmOfPass(coat, materials)
}

/** One stratum of the film section, µm. */
export interface Stratum { coatId: string, film: number, /** Film below it. */ below: number }

/** The strata from the ground up where every coat is laid in full, µm. */
export function filmSection(body: Pick<SchemeBody, 'stack'>, materials: Pick<Materials, 'paints'>): Stratum[] {
  const strata: Stratum[] = []
  for (const coat of coatsOf(body.stack)) {
    const last = strata.at(-1)
    strata.push({ coatId: coat.id, film: filmOfCoat(coat, materials), below: last ? last.below + last.film : 0 })
  }
  return strata
}
