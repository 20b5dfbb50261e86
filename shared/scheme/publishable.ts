import type { SchemeBody } from './body'
import type { Coat } from './coat'
import type { Materials } from './materials'
import { brackets, coatsOf, stackFaults } from './stack-order'

/** What a coat is called in a sentence: its number and, when it has one, its name. */
export function coatWord(body: Pick<SchemeBody, 'stack'>, coat: Coat): string {
  const number = coatsOf(body.stack).findIndex(each => each.id === coat.id) + 1
  return coat.name === '' ? `Coat ${number}` : `Coat ${number}, “${coat.name}”,`
}

function liesNowhere(coat: Coat, materials: Materials): boolean {
  const { where } = coat
  const finIds = new Set(materials.blank.shape.fins.map(fin => fin.id))
  const onFins = where.fins.some(fin => (fin.root > 0 || fin.tip > 0) && (fin.fin === 'all' ? finIds.size > 0 : finIds.has(fin.fin)))
  if (coat.marks.length > 0) return false
  if (!where.body) return !onFins
  return where.along !== undefined && where.along.to <= where.along.from && !onFins
}

function faultsOfCoat(body: SchemeBody, coat: Coat, materials: Materials): string[] {
  const word = coatWord(body, coat)
  const unknown = coat.mix.parts.filter(part => !materials.paints.some(paint => paint.id === part.paintId))
  return [
    ...coat.mix.parts.length === 0 ? [`${word} has no paint in its cup.`] : [],
    ...unknown.length > 0 ? [`${word} uses a paint that is not on the shelf.`] : [],
    ...liesNowhere(coat, materials) ? [`${word} lies nowhere on this blank.`] : [],
  ]
}

/** Why a draft cannot be published yet, each reason a sentence; empty when it can. */
export function whyNotPublishable(body: SchemeBody, materials: Materials): string[] {
  const coats = coatsOf(body.stack)
  const bare = brackets(body).filter(bracket => bracket.coatIds.length === 0)
  return [
    ...coats.length === 0 ? ['There are no coats yet.'] : [],
    ...coats.flatMap(coat => faultsOfCoat(body, coat, materials)),
    ...stackFaults(body).map(fault => fault.sentence),
    ...bare.map(({ mask }) => `“${mask.name}” is fitted and lifted again without a coat between.`),
  ]
}
