import type { SchemeBody } from '../body'
import type { Coat } from '../coat'
import type { Materials } from '../materials'
import { meshFills } from '../outline/mesh-fill'
import { coatWord } from '../publishable'
import { coatsOf } from '../stack-order'
import type { Finding, GroundUnder, PaintToday } from './finding'
import { groundFindings } from './grounds'
import { restFindings } from './rests'

/**
 * A second look at a stack: what an old hand would ask about before anybody sprays it. It stops nothing.
 *
 * @param grounds what the engine sees under each coat; a coat that is not among them is not looked at for its ground
 * @param shelf   the paints as they stand today; a paint that is not among them is not looked at
 */
export function secondLook(body: SchemeBody, materials: Materials, grounds: readonly GroundUnder[], shelf: readonly PaintToday[]): Finding[] {
  const coats = coatsOf(body.stack)
  const order = new Map(coats.map((coat, i) => [coat.id, i]))
  return [
    ...groundFindings(body, materials, coats, grounds),
    ...restFindings(body, materials),
    ...meshFills(body, materials).map((fill): Finding => ({ look: 'mesh-filled', coatId: fill.coatId, key: fill.key, says: fill.says, why: fill.why })),
    ...coats.flatMap(coat => paintFindings(body, materials, coat, shelf)),
  ].sort((a, b) => order.get(a.coatId)! - order.get(b.coatId)!)
}

/** The warnings that nobody has answered yet. */
export function openFindings(findings: readonly Finding[], body: Pick<SchemeBody, 'answered'>): Finding[] {
  const answered = new Set(body.answered)
  return findings.filter(finding => !answered.has(finding.key))
}

function paintFindings(body: SchemeBody, { paints }: Materials, coat: Coat, shelf: readonly PaintToday[]): Finding[] {
  return coat.mix.parts.flatMap(({ paintId }) => {
    const today = shelf.find(paint => paint.id === paintId)
    const name = paints.find(paint => paint.id === paintId)?.name ?? 'a paint'
    const finding = (look: Finding['look'], says: string, why: string): Finding =>
      ({ look, coatId: coat.id, key: `${look} ${coat.id} ${paintId}`, says: `${coatWord(body, coat)} ${says}`, why })
    if (today?.retired) return [finding('paint-retired', `uses ${name}, which is put away on the shelf.`, 'Nobody will buy it again: find a coat that comes near before the next run.')]
    if (today && today.volumeLeft <= 0) return [finding('paint-gone', `uses ${name}, of which nothing is left.`, 'A new bottle may be another colour: spray it out before the run.')]
    return []
  })
}
