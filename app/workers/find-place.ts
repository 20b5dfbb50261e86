import type { SceneWish } from '#shared/optics/find-scene'
import { groundFromLab } from '#shared/optics/known-film'
import { isClearCoat } from '#shared/picture/coat-paint'
import { type ShownCoat, shownCoats } from '#shared/picture/shown-coats'
import type { ZoneBench } from '#shared/picture/zone-bench'
import type { ZoneName } from '#shared/blank/zone-names'
import type { FindQuestion } from '#shared/scheme/find/find-messages'
import { canonicalJson } from '#shared/scheme/canonical'
import { laidCoats } from '#shared/scheme/laid-coats'

/** A zone that a coat reaches by less than this is judged as if it did reach it, as a let-down is. */
const REACHED = 0.05

/** Where a coat is looked for. */
export interface FindPlace extends SceneWish {
  hardlyReaches: boolean
  /** What the coats below, the coat itself and those above would be called once it is laid. */
  numbers: readonly number[]
}

/** Where on the blank and in the stack a question looks for its coat: what lies below and above there, in passes. */
export function findPlace({ look, coat, row, zone, clear }: Pick<FindQuestion, 'look' | 'coat' | 'row' | 'zone' | 'clear'>, bench: ZoneBench): FindPlace {
  const { body, materials } = look
  // Fins have names of their own, so a zone is any text; one the blank lacks has no share.
  const here = zone as ZoneName
  const stack = body.stack.toSpliced(Math.min(row, body.stack.length), 0, { act: 'coat' as const, coat })
  const laid = laidCoats({ stack, masks: body.masks })
  const place = laid.findIndex(each => each.coat.id === coat.id)
  const before = new Set(laid.slice(0, place).map(each => each.coat.id))

  const all = shownCoats(look, { upTo: 'all', clear })
  const numberOf = new Map(laid.map(each => [each.coat.id, each.number]))
  const inZone = (coats: readonly ShownCoat[]) => coats
    .map(each => ({ number: numberOf.get(each.laid.coat.id) ?? each.laid.number, optics: each.paint, passes: each.passes * bench.share(look, each, here) }))
    .filter(({ passes }) => passes > 0)
  const below = inZone(all.filter(each => before.has(each.laid.coat.id)))
  const above = inZone(all.filter(each => !before.has(each.laid.coat.id) && isClearCoat(each.laid.coat, materials)))

  const { id, tool, gun, where, marks } = coat
  const laidHere = laid[place]!
  const share = bench.share(look, { laid: laidHere, paint: materials.paints[0]!.optics, passes: 1, placeKey: canonicalJson({ id, tool, gun, where, marks, masks: laidHere.masks }) }, here)
  return {
    ground: groundFromLab(body.ground.colour, body.ground.finish),
    below, above, numbers: [...below.map(({ number }) => number), laidHere.number, ...above.map(({ number }) => number)],
    finish: clear ? 'gloss' : 'matt',
    laid: share > REACHED ? share : 1,
    hardlyReaches: share <= REACHED,
  }
}
