import type { SchemeBody } from '#shared/scheme/body'
import { canonicalJson } from '#shared/scheme/canonical'
import type { Coat } from '#shared/scheme/coat'
import type { Mask } from '#shared/scheme/mask'
import { coatsOf } from '#shared/scheme/stack-order'

const paintsOf = ({ mix }: Coat) => mix.parts.map(part => part.paintId).sort().join(' ')

/** Places of a longest run of keys that both have in the same order, as pairs. */
function longestRun(from: readonly string[], to: readonly string[]): (readonly [number, number])[] {
  const length = Array.from({ length: from.length + 1 }, () => Array<number>(to.length + 1).fill(0))
  const at = (i: number, j: number) => length[i]?.[j] ?? 0
  for (let i = from.length - 1; i >= 0; i--) {
    for (let j = to.length - 1; j >= 0; j--) length[i]![j] = from[i] === to[j] ? at(i + 1, j + 1) + 1 : Math.max(at(i + 1, j), at(i, j + 1))
  }
  const run: [number, number][] = []
  for (let i = 0, j = 0; i < from.length && j < to.length;) {
    if (from[i] === to[j]) run.push([i++, j++])
    else if (at(i + 1, j) >= at(i, j + 1)) i++
    else j++
  }
  return run
}

/** What makes two masks the same piece of work: their origin in the workshop, or else their form. */
const maskKey = (mask: Mask) => mask.fromMaskId ?? canonicalJson(mask.form)

/**
 * The second of two bodies that have no coat in common by origin, written so that the two can be laid side by side: its coats of the same
 * paints in the same order, and its masks of the same origin or form, go by the ids they have in the first. A colourway, which kept its
 * ids, comes back as it is.
 */
export function pairCoats(from: SchemeBody, to: SchemeBody): SchemeBody {
  const [first, second] = [coatsOf(from.stack), coatsOf(to.stack)]
  if (second.some(coat => first.some(other => other.id === coat.id))) return to
  const coatIds = new Map(longestRun(first.map(paintsOf), second.map(paintsOf)).map(([i, j]) => [second[j]?.id, first[i]?.id]))
  const free = [...from.masks]
  const maskIds = new Map<string, string>()
  for (const mask of to.masks) {
    const place = free.findIndex(other => maskKey(other) === maskKey(mask))
    const [twin] = place < 0 ? [] : free.splice(place, 1)
    if (twin) maskIds.set(mask.id, twin.id)
  }
  const maskId = (id: string) => maskIds.get(id) ?? id
  return {
    ...to,
    masks: to.masks.map(mask => ({ ...mask, id: maskId(mask.id) })),
    stack: to.stack.map(item => item.act === 'coat'
      ? { act: 'coat', coat: { ...item.coat, id: coatIds.get(item.coat.id) ?? item.coat.id } }
      : { act: item.act, maskId: maskId(item.maskId) }),
  }
}
