import { ANSWERED_MAX, COATS_MAX, type Eyes, type Ground, MASKS_MAX, type SchemeBody, type StackItem } from './body'
import { sameValue } from './canonical'
import type { Coat } from './coat'
import type { Mask } from './mask'
import { carried, mergeOrder, type Side, type ThreeBodies } from './merge-order'
import { coatsOf, stackFaults } from './stack-order'

/** One thing seen three ways; null where it is not there. */
export interface Three<T> { base: T, mine: T, theirs: T }

/** Something both changed, each in another way: a person chooses. */
export type Clash
  = | { part: 'coat', id: string } & Three<Coat | null>
    | { part: 'mask', id: string } & Three<Mask | null>
    | { part: 'ground' } & Three<Ground>
    | { part: 'eyes' } & Three<Eyes | null>
    | { part: 'blank' } & Three<string>
    /** In which order coats are laid and masks fitted. */
    | { part: 'order' }
    /** Nothing is known of what both began with, or both together are more than one scheme holds. */
    | { part: 'whole' }

/** Which side is taken for each clash, by `clashKey`; mine where nothing is said. One word is for all of them. */
export type Choices = Side | ReadonlyMap<string, Side>

/** Two versions made one: what only one side changed is in it, and for the rest what was chosen. */
export interface Merge { body: SchemeBody, clashes: Clash[] }

/** A clash by the name under which it is chosen. */
export function clashKey(clash: Clash): string {
  return clash.part === 'coat' || clash.part === 'mask' ? `${clash.part} ${clash.id}` : clash.part
}

/** The side that is taken for a clash. */
export function sideOf(choices: Choices, key: string): Side {
  return typeof choices === 'string' ? choices : choices.get(key) ?? 'mine'
}

function whole(mine: SchemeBody, theirs: SchemeBody, choices: Choices): Merge {
  if (sameValue(mine, theirs)) return { body: mine, clashes: [] }
  return { body: sideOf(choices, 'whole') === 'mine' ? mine : theirs, clashes: [{ part: 'whole' }] }
}

/** Takes what only one side changed; null when both did, each in another way. */
function settled<T>({ base, mine, theirs }: Three<T>): { value: T } | null {
  if (sameValue(mine, theirs) || sameValue(theirs, base)) return { value: mine }
  return sameValue(mine, base) ? { value: theirs } : null
}

/** Things with lasting ids as each version has them; `carriedBy` names those a side laid elsewhere. */
function mergeThings<T extends { id: string }>(
  lists: Three<readonly T[]>, wasCarried: Record<Side, (id: string) => boolean>, clashed: (clash: { id: string } & Three<T | null>) => Side,
): Map<string, T> {
  const [base, mine, theirs] = [lists.base, lists.mine, lists.theirs].map(list => new Map(list.map(thing => [thing.id, thing])))
  const kept = new Map<string, T>()
  for (const id of new Set([...base?.keys() ?? [], ...mine?.keys() ?? [], ...theirs?.keys() ?? []])) {
    const three = { base: base?.get(id) ?? null, mine: mine?.get(id) ?? null, theirs: theirs?.get(id) ?? null }
    // What one takes out and the other carries elsewhere is still wanted by the other.
    const isWanted = (three.mine === null && three.theirs !== null && three.base !== null && wasCarried.theirs(id))
      || (three.theirs === null && three.mine !== null && three.base !== null && wasCarried.mine(id))
    const found = isWanted ? null : settled(three)
    const thing = found ? found.value : three[clashed({ id, ...three })]
    if (thing !== null) kept.set(id, thing)
  }
  return kept
}

/** Ids in the order of whichever side changed it, those the other added at the end. */
function mergeIds({ base, mine, theirs }: Three<readonly string[]>): string[] {
  const [lead, more] = sameValue(base, mine) ? [theirs, mine] : [mine, theirs]
  return [...new Set([...lead, ...more])]
}

function mergeAnswers(three: ThreeBodies): string[] {
  const lists = { base: three.base.answered ?? [], mine: three.mine.answered ?? [], theirs: three.theirs.answered ?? [] }
  const found = settled<readonly string[]>(lists)
  if (found) return [...found.value]
  const isTakenBack = (key: string) => lists.base.includes(key) && !(lists.mine.includes(key) && lists.theirs.includes(key))
  return mergeIds(lists).filter(key => !isTakenBack(key)).slice(-ANSWERED_MAX)
}

/**
 * Makes one body of two that began as `base`: coat by coat, mask by mask, order, ground, eyes and blank. What only one side
 * changed is taken; what both changed alike too; the rest clashes and goes by `choices`. Without a base, or where both together
 * are too much for one scheme, one of the two is taken whole. The result can be done at a bench whenever all three can.
 */
export function mergeBodies(base: SchemeBody | null, mine: SchemeBody, theirs: SchemeBody, choices: Choices = new Map()): Merge {
  if (!base || [base, mine, theirs].some(body => stackFaults(body).length > 0)) return whole(mine, theirs, choices)
  const three: ThreeBodies = { base, mine, theirs }
  const clashes: Clash[] = []
  const choose = (clash: Clash): Side => {
    clashes.push(clash)
    return sideOf(choices, clashKey(clash))
  }
  const one = <T>(values: Three<T>, clash: (values: Three<T>) => Clash): T => {
    const found = settled(values)
    return found ? found.value : values[choose(clash(values))]
  }

  const [byMine, byTheirs] = [carried(base, mine), carried(base, theirs)]
  const coats = mergeThings(
    { base: coatsOf(base.stack), mine: coatsOf(mine.stack), theirs: coatsOf(theirs.stack) },
    { mine: id => byMine.has(`coat ${id}`), theirs: id => byTheirs.has(`coat ${id}`) }, clash => choose({ part: 'coat', ...clash }),
  )
  const masks = mergeThings(
    { base: base.masks, mine: mine.masks, theirs: theirs.masks },
    { mine: id => byMine.has(`fit ${id}`), theirs: id => byTheirs.has(`fit ${id}`) }, clash => choose({ part: 'mask', ...clash }),
  )
  if (coats.size > COATS_MAX || masks.size > MASKS_MAX) return whole(mine, theirs, choices)

  const kept = new Map<string, StackItem>([
    ...[...coats.values()].map(coat => [`coat ${coat.id}`, { act: 'coat', coat }] as const),
    ...[...masks.keys()].flatMap(maskId => (['fit', 'lift'] as const).map(act => [`${act} ${maskId}`, { act, maskId }] as const)),
  ])
  const order = mergeOrder(three, new Set(kept.keys()), sideOf(choices, 'order'))
  if (order.isClash) clashes.push({ part: 'order' })

  const ids = (body: SchemeBody) => body.masks.map(mask => mask.id)
  const answered = mergeAnswers(three)
  const body: SchemeBody = {
    format: 1,
    blankId: one({ base: base.blankId, mine: mine.blankId, theirs: theirs.blankId }, values => ({ part: 'blank', ...values })),
    ground: one({ base: base.ground, mine: mine.ground, theirs: theirs.ground }, values => ({ part: 'ground', ...values })),
    eyes: one({ base: base.eyes, mine: mine.eyes, theirs: theirs.eyes }, values => ({ part: 'eyes', ...values })),
    stack: order.keys.flatMap(key => kept.get(key) ?? []),
    masks: mergeIds({ base: ids(base), mine: ids(mine), theirs: ids(theirs) }).flatMap(id => masks.get(id) ?? []),
    ...answered.length > 0 ? { answered } : {},
  }
  return { body, clashes }
}
