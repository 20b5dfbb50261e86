import type { SchemeBody, StackItem } from './body'
import { sameValue } from './canonical'

/** Which of two people's versions something is taken from. */
export type Side = 'mine' | 'theirs'

/** One body seen three ways: as both last had it, and as each has it now. */
export interface ThreeBodies { base: SchemeBody, mine: SchemeBody, theirs: SchemeBody }

/** The rows of a merged stack by their names, and whether a person has to say in which order. */
export interface MergedOrder { keys: string[], isClash: boolean }

/** A row of a stack by what it stands for: one name for the same coat, fit or lift in every version. */
export function rowKey(item: StackItem): string {
  return item.act === 'coat' ? `coat ${item.coat.id}` : `${item.act} ${item.maskId}`
}

const keysOf = (body: SchemeBody) => body.stack.map(rowKey)

/** Names that need not move when one order becomes the other: a longest run that both have in the same order. */
function staying(from: readonly string[], to: readonly string[]): Set<string> {
  const place = new Map(to.map((key, i) => [key, i]))
  const runs: { end: number, last: number, length: number }[] = []
  const shared = from.filter(key => place.has(key))
  shared.forEach((key, i) => {
    const end = place.get(key) ?? 0
    let best = { last: -1, length: 0 }
    for (let before = 0; before < i; before++) {
      const run = runs[before]
      if (run && run.end < end && run.length > best.length) best = { last: before, length: run.length }
    }
    runs.push({ end, last: best.last, length: best.length + 1 })
  })
  const stay = new Set<string>()
  let at = runs.reduce((best, run, i) => run.length > (runs[best]?.length ?? 0) ? i : best, runs.length > 0 ? 0 : -1)
  for (let run = runs[at]; run; run = runs[at]) {
    stay.add(shared[at] ?? '')
    at = run.last
  }
  return stay
}

/** A mask's fit and lift are one thing to carry: a version that moves one of them has both. */
function withPairs(keys: Iterable<string>): Set<string> {
  return new Set([...keys].flatMap((key) => {
    const [act = '', id = ''] = key.split(' ')
    return act === 'coat' ? [key] : [`fit ${id}`, `lift ${id}`]
  }))
}

/** Rows that a version laid, fitted or carried elsewhere since the base. */
export function carried(base: SchemeBody, now: SchemeBody): Set<string> {
  const [before, after] = [keysOf(base), keysOf(now)]
  const stay = staying(before, after)
  return withPairs(after.filter(key => !stay.has(key)))
}

/** Which masks are on while each coat is laid, as "coat mask" pairs. */
function covered(keys: readonly string[]): Set<string> {
  const on = new Set<string>()
  const pairs = new Set<string>()
  for (const key of keys) {
    const [act = '', id = ''] = key.split(' ')
    if (act === 'fit') on.add(id)
    else if (act === 'lift') on.delete(id)
    else for (const maskId of on) pairs.add(`${id} ${maskId}`)
  }
  return pairs
}

/** Whether a coat that all three have would lie under a mask, or no longer, though neither version says so. */
function coversOtherwise(keys: readonly string[], { base, mine, theirs }: ThreeBodies): boolean {
  const [was, own, other, now] = [covered(keysOf(base)), covered(keysOf(mine)), covered(keysOf(theirs)), covered(keys)]
  const all = new Set(keys)
  const inAll = (key: string) => all.has(key) && [base, mine, theirs].every(body => body.stack.some(item => rowKey(item) === key))
  return [...new Set([...was, ...own, ...other, ...now])].some((pair) => {
    const [coatId = '', maskId = ''] = pair.split(' ')
    if (!inAll(`coat ${coatId}`) || !inAll(`fit ${maskId}`)) return false
    const wanted = own.has(pair) === was.has(pair) ? other.has(pair) : own.has(pair)
    return wanted !== now.has(pair)
  })
}

/** The rows of a version between those that stay, by the row that stays below them; those on the ground under `''`. */
function gaps(keys: readonly string[], stable: ReadonlySet<string>, take: (key: string) => boolean): Map<string, string[]> {
  const found = new Map<string, string[]>([['', []]])
  let below = ''
  for (const key of keys) {
    if (stable.has(key)) {
      below = key
      found.set(below, [])
    }
    else if (take(key)) found.get(below)?.push(key)
  }
  return found
}

/**
 * The order of a merged stack: `kept` are the rows it has. What one side alone carried or laid lies where that side has it.
 * Where both did at one place, or a coat would come under a mask or out of it though neither meant that, it is a clash: then the
 * order is that of `choice`, and what only the other has lies under what is new there. A mask is always fitted before it is lifted.
 */
export function mergeOrder(three: ThreeBodies, kept: ReadonlySet<string>, choice: Side): MergedOrder {
  const [before, own, other] = [keysOf(three.base), keysOf(three.mine), keysOf(three.theirs)]
  const [byMine, byTheirs] = [carried(three.base, three.mine), carried(three.base, three.theirs)]
  const [inMine, inTheirs] = [new Set(own), new Set(other)]
  const stable = new Set(before.filter(key => kept.has(key) && inMine.has(key) && inTheirs.has(key) && !byMine.has(key) && !byTheirs.has(key)))
  const places = ['', ...before.filter(key => stable.has(key))]
  const between = (keys: readonly string[], take: (key: string) => boolean) => {
    const found = gaps(keys, stable, key => kept.has(key) && take(key))
    return places.map(place => found.get(place) ?? [])
  }
  /** What stays in its order, and between it what each side owns: where both own something, that of `choice` on top. */
  const woven = (owner: (key: string) => Side): MergedOrder => {
    const mine = between(own, key => owner(key) === 'mine')
    const theirs = between(other, key => owner(key) === 'theirs')
    const keys = places.flatMap((place, i) => {
      const rows = choice === 'mine' ? [...theirs[i] ?? [], ...mine[i] ?? []] : [...mine[i] ?? [], ...theirs[i] ?? []]
      return place === '' ? rows : [place, ...rows]
    })
    return { keys, isClash: mine.some((rows, i) => rows.length > 0 && (theirs[i]?.length ?? 0) > 0) }
  }

  // Both did the very same: there is nothing to choose.
  if (sameValue(between(own, () => true), between(other, () => true))) return { ...woven(key => inMine.has(key) ? 'mine' : 'theirs'), isClash: false }
  const isContested = [...kept].some(key => byMine.has(key) && byTheirs.has(key))
  const together = woven(key => !inTheirs.has(key) || (inMine.has(key) && byMine.has(key)) ? 'mine' : 'theirs')
  if (!isContested && !together.isClash && !coversOtherwise(together.keys, three)) return together
  const led = choice === 'mine' ? inMine : inTheirs
  return { keys: woven(key => led.has(key) ? choice : choice === 'mine' ? 'theirs' : 'mine').keys, isClash: true }
}
