import { COATS_MAX, MASKS_MAX, type SchemeBody, type StackItem } from './body'
import type { BuildUpSequence } from './build-up'
import type { Coat, LaidFrom, ZoneName } from './coat'
import { laidCoats } from './laid-coats'
import { coatsOf } from './stack-order'

/** The body with a sequence laid into it, or the reason why it cannot be, as a sentence. */
export type LayOutcome = { ok: true, body: SchemeBody, coatIds: string[] } | { ok: false, because: string }

/** Where and how a sequence is laid. */
export interface Laying {
  /** Row at which its first item stands, counted from the ground, 0 first. */
  row: number
  /** Zones instead of each coat's own; null keeps them. */
  onto: readonly ZoneName[] | null
  /** New ids for its coats and masks: as many as `idsNeeded` says. */
  ids: readonly string[]
  /** The build-up it is laid from and stays linked to; null for coats that stand by themselves. */
  link: Pick<LaidFrom, 'buildUpId' | 'edition' | 'layingId'> | null
}

/** A coat by itself: without its link. */
export function unlinked({ laidFrom: _link, ...coat }: Coat): Coat {
  return coat
}

/**
 * The chosen coats of a finish, from the ground up, with every mask that is on for one of them: fitted before the first and lifted after
 * the last of them that it is on for. Coats keep their ids and lose their links; ids that are not in the stack are passed over.
 */
export function cutOut(body: Pick<SchemeBody, 'stack' | 'masks'>, coatIds: Iterable<string>): BuildUpSequence {
  const chosen = new Set(coatIds)
  const worn = new Set(laidCoats(body).filter(({ coat }) => chosen.has(coat.id)).flatMap(({ masks }) => masks.map(mask => mask.id)))
  return {
    stack: body.stack.flatMap((item): StackItem[] => {
      if (item.act !== 'coat') return worn.has(item.maskId) ? [item] : []
      return chosen.has(item.coat.id) ? [{ act: 'coat', coat: unlinked(item.coat) }] : []
    }),
    masks: body.masks.filter(mask => worn.has(mask.id)),
  }
}

/** How many new ids laying a sequence takes. */
export function idsNeeded(sequence: BuildUpSequence): number {
  return coatsOf(sequence.stack).length + sequence.masks.length
}

/** Lays a sequence into a finish at a row, with new ids and, where wanted, in other zones. Masks keep their fitting, so that they lie alike. */
export function layInto(body: SchemeBody, sequence: BuildUpSequence, { row, onto, ids, link }: Laying): LayOutcome {
  const coats = coatsOf(sequence.stack)
  if (coatsOf(body.stack).length + coats.length > COATS_MAX) return { ok: false, because: `A scheme has at most ${COATS_MAX} coats.` }
  if (body.masks.length + sequence.masks.length > MASKS_MAX) return { ok: false, because: `A scheme has at most ${MASKS_MAX} masks.` }
  if (!Number.isInteger(row) || row < 0 || row > body.stack.length) return { ok: false, because: 'A coat lies on the ground or on another coat.' }
  const olds = [...coats.map(coat => coat.id), ...sequence.masks.map(mask => mask.id)]
  if (ids.length < olds.length) throw new RangeError(`layInto: ${ids.length} new ids for ${olds.length} coats and masks`)
  const newId = new Map(olds.map((old, i) => [old, ids[i]!]))
  const idOf = (old: string) => newId.get(old) ?? old
  const stack = sequence.stack.map((item): StackItem => item.act === 'coat'
    ? { act: 'coat', coat: laid(item.coat, idOf(item.coat.id), onto, link) }
    : { ...item, maskId: idOf(item.maskId) })
  return {
    ok: true,
    body: {
      ...body,
      stack: body.stack.toSpliced(row, 0, ...stack),
      masks: [...body.masks, ...sequence.masks.map(mask => ({ ...mask, id: idOf(mask.id) }))],
    },
    coatIds: coats.map(coat => idOf(coat.id)),
  }
}

function laid(coat: Coat, id: string, onto: Laying['onto'], link: Laying['link']): Coat {
  return {
    ...unlinked(coat),
    id,
    ...onto ? { where: { ...coat.where, zones: [...onto] } } : {},
    ...link ? { laidFrom: { ...link, coatId: coat.id, ...onto ? { onto: [...onto] } : {} } } : {},
  }
}
