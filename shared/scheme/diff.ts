import type { Eyes, Ground, SchemeBody, StackItem } from './body'
import type { Coat } from './coat'
import type { Mask } from './mask'
import { sameValue } from './canonical'
import { brackets, coatNumber, coatsOf } from './stack-order'

/** Something before and after. */
export interface Change<T> { from: T, to: T }

/** A coat that is in both, with the fields that differ. */
export interface CoatChange extends Change<Coat> { coatId: string, fields: (keyof Coat)[] }

/** A mask that is in both, with the fields that differ. */
export interface MaskChange extends Change<Mask> { maskId: string, fields: (keyof Mask)[] }

/** A coat that lies in another order among those in both; numbers count from the ground in each. */
export interface CoatMove extends Change<number> { coatId: string }

/** A mask that is fitted for other coats; the coats of each that both have. */
export interface SpanChange extends Change<string[]> { maskId: string }

/** A row of a stack by what it stands for. */
export interface StackKey { act: StackItem['act'], id: string }

/** How one body differs from another, by the lasting ids of coats and masks. */
export interface SchemeDiff {
  blankId: Change<string> | null
  ground: Change<Ground> | null
  eyes: Change<Eyes | null> | null
  added: Coat[]
  takenOut: Coat[]
  /** The fewest coats that, carried elsewhere, make one order of the other. */
  moved: CoatMove[]
  changed: CoatChange[]
  masksAdded: Mask[]
  masksTakenOut: Mask[]
  masksChanged: MaskChange[]
  masksSpanned: SpanChange[]
  /** The rows of the later stack; null when they are those of the earlier. */
  rows: StackKey[] | null
  /** The masks in the later order; null when it is that of the earlier. */
  maskOrder: string[] | null
  /** Warnings answered in each; null when they are the same. */
  answered: Change<string[]> | null
}

function keysOf(stack: readonly StackItem[]): StackKey[] {
  return stack.map(item => ({ act: item.act, id: item.act === 'coat' ? item.coat.id : item.maskId }))
}

function change<T>(from: T, to: T): Change<T> | null {
  return sameValue(from, to) ? null : { from, to }
}

/** Names of the fields in which two records differ, in the order in which they stand. */
function fieldsThatDiffer<T extends object>(from: T, to: T): (keyof T)[] {
  const names = new Set([...Object.keys(from), ...Object.keys(to)]) as Set<keyof T & string>
  return [...names].filter(name => !sameValue(from[name] ?? null, to[name] ?? null))
}

/** Ids that need not move when one order becomes the other: a longest run that both have in the same order. */
function staying(from: readonly string[], to: readonly string[]): Set<string> {
  const place = new Map(to.map((id, i) => [id, i]))
  const longest: { end: number, ids: string[] }[] = []
  for (const id of from) {
    const at = place.get(id)
    if (at === undefined) continue
    const before = longest.filter(run => run.end < at).reduce<string[]>((best, run) => run.ids.length > best.length ? run.ids : best, [])
    longest.push({ end: at, ids: [...before, id] })
  }
  return new Set(longest.reduce<string[]>((best, run) => run.ids.length > best.length ? run.ids : best, []))
}

function movedCoats(from: SchemeBody, to: SchemeBody): CoatMove[] {
  const before = coatsOf(from.stack).map(coat => coat.id)
  const after = coatsOf(to.stack).map(coat => coat.id)
  const stay = staying(before, after)
  return before.filter(id => after.includes(id) && !stay.has(id))
    .map(coatId => ({ coatId, from: coatNumber(from.stack, coatId), to: coatNumber(to.stack, coatId) }))
}

function spannedMasks(from: SchemeBody, to: SchemeBody): SpanChange[] {
  const kept = new Set(coatsOf(to.stack).map(coat => coat.id).filter(id => coatNumber(from.stack, id) > 0))
  const covers = (body: SchemeBody) => new Map(brackets(body).map(each => [each.mask.id, each.coatIds.filter(id => kept.has(id))]))
  const before = covers(from)
  const after = covers(to)
  return from.masks.flatMap(({ id: maskId }) => {
    const a = before.get(maskId) ?? []
    const b = after.get(maskId) ?? []
    return to.masks.some(mask => mask.id === maskId) && !sameValue([...a].sort(), [...b].sort()) ? [{ maskId, from: a, to: b }] : []
  })
}

/** How `to` differs from `from`. Nothing differs between a body and itself, and `applyDiff(from, diffBodies(from, to))` is `to`. */
export function diffBodies(from: SchemeBody, to: SchemeBody): SchemeDiff {
  const before = new Map(coatsOf(from.stack).map(coat => [coat.id, coat]))
  const after = new Map(coatsOf(to.stack).map(coat => [coat.id, coat]))
  const masksBefore = new Map(from.masks.map(mask => [mask.id, mask]))
  const masksAfter = new Map(to.masks.map(mask => [mask.id, mask]))
  return {
    blankId: change(from.blankId, to.blankId),
    ground: change(from.ground, to.ground),
    eyes: change(from.eyes, to.eyes),
    added: [...after.values()].filter(coat => !before.has(coat.id)),
    takenOut: [...before.values()].filter(coat => !after.has(coat.id)),
    moved: movedCoats(from, to),
    changed: [...before.values()].flatMap((coat) => {
      const later = after.get(coat.id)
      return later && !sameValue(coat, later) ? [{ coatId: coat.id, from: coat, to: later, fields: fieldsThatDiffer(coat, later) }] : []
    }),
    masksAdded: to.masks.filter(mask => !masksBefore.has(mask.id)),
    masksTakenOut: from.masks.filter(mask => !masksAfter.has(mask.id)),
    masksChanged: from.masks.flatMap((mask) => {
      const later = masksAfter.get(mask.id)
      return later && !sameValue(mask, later) ? [{ maskId: mask.id, from: mask, to: later, fields: fieldsThatDiffer(mask, later) }] : []
    }),
    masksSpanned: spannedMasks(from, to),
    rows: change(keysOf(from.stack), keysOf(to.stack))?.to ?? null,
    maskOrder: change(from.masks.map(mask => mask.id), to.masks.map(mask => mask.id))?.to ?? null,
    answered: change(from.answered ?? [], to.answered ?? []),
  }
}

/** Whether nothing differs. */
export function isEmptyDiff(diff: SchemeDiff): boolean {
  return Object.values(diff).every(value => value === null || (Array.isArray(value) && value.length === 0))
}

/**
 * The body one gets by doing what a difference says.
 * @throws {RangeError} when the difference was not made from this body
 */
export function applyDiff(body: SchemeBody, diff: SchemeDiff): SchemeBody {
  const coats = new Map(coatsOf(body.stack).map(coat => [coat.id, coat]))
  for (const coat of [...diff.added, ...diff.changed.map(each => each.to)]) coats.set(coat.id, coat)
  const masks = new Map(body.masks.map(mask => [mask.id, mask]))
  for (const mask of [...diff.masksAdded, ...diff.masksChanged.map(each => each.to)]) masks.set(mask.id, mask)

  const rowOf = ({ act, id }: StackKey): StackItem => act === 'coat' ? { act, coat: known(coats, id) } : { act, maskId: id }
  const { answered: before, ...bare } = body
  const answered = diff.answered?.to ?? before ?? []
  return {
    ...bare,
    ...answered.length > 0 ? { answered } : {},
    blankId: diff.blankId?.to ?? body.blankId,
    ground: diff.ground?.to ?? body.ground,
    eyes: diff.eyes ? diff.eyes.to : body.eyes,
    stack: (diff.rows ?? keysOf(body.stack)).map(rowOf),
    masks: (diff.maskOrder ?? body.masks.map(mask => mask.id)).map(id => known(masks, id)),
  }
}

function known<T>(things: ReadonlyMap<string, T>, id: string): T {
  const thing = things.get(id)
  if (thing === undefined) throw new RangeError(`applyDiff: nothing of the body has the id ${id}`)
  return thing
}
