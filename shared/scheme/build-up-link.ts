import type { SchemeBody } from './body'
import type { BuildUpSequence, BuildUpView } from './build-up'
import { idsNeeded, layInto, type LayOutcome, unlinked } from './build-up-lay'
import type { Coat, LaidFrom } from './coat'
import { brackets, coatsOf } from './stack-order'

/** Coats of a finish that were laid together from one build-up, from the ground up. */
export interface LinkedCoats { layingId: string, buildUpId: string, edition: number, coatIds: string[] }

/** What one laying was made from. */
type Origin = Pick<BuildUpView, 'id' | 'edition' | 'sequence'>

/** Every laying of a finish that is still linked to its build-up, in the order in which they first come up. */
export function linkedCoats(body: Pick<SchemeBody, 'stack'>): LinkedCoats[] {
  const found = new Map<string, LinkedCoats>()
  for (const { id, laidFrom } of coatsOf(body.stack)) {
    if (!laidFrom) continue
    const { layingId, buildUpId, edition } = laidFrom
    const one = found.get(layingId) ?? { layingId, buildUpId, edition, coatIds: [] }
    found.set(layingId, { ...one, edition: Math.min(one.edition, edition), coatIds: [...one.coatIds, id] })
  }
  return [...found.values()]
}

/** Layings whose build-up has a later edition, each with it. */
export function changedSince<O extends Origin>(body: Pick<SchemeBody, 'stack'>, buildUps: readonly O[]): { laying: LinkedCoats, buildUp: O }[] {
  return linkedCoats(body).flatMap((laying) => {
    const buildUp = buildUps.find(each => each.id === laying.buildUpId)
    return buildUp && buildUp.edition > laying.edition ? [{ laying, buildUp }] : []
  })
}

function withCoats(body: SchemeBody, change: (coat: Coat) => Coat): SchemeBody {
  return { ...body, stack: body.stack.map(item => item.act === 'coat' ? { act: 'coat', coat: change(item.coat) } : item) }
}

/** The same finish, its coats of one laying standing by themselves from now on. */
export function cutLink(body: SchemeBody, layingId: string): SchemeBody {
  return withCoats(body, coat => coat.laidFrom?.layingId === layingId ? unlinked(coat) : coat)
}

/** The same finish, its coats staying as they are though the build-up has a later edition: it is not told of again until the next. */
export function keepAsLaid(body: SchemeBody, layingId: string, edition: number): SchemeBody {
  return withCoats(body, coat => coat.laidFrom?.layingId === layingId ? { ...coat, laidFrom: { ...coat.laidFrom, edition } } : coat)
}

/** The same finish, the coats a build-up was saved from linked to it. */
export function linkCoats(body: SchemeBody, { id, edition, sequence }: Origin, layingId: string): SchemeBody {
  const own = new Set(coatsOf(sequence.stack).map(coat => coat.id))
  const link = (coatId: string): LaidFrom => ({ buildUpId: id, edition, coatId, layingId })
  return withCoats(body, coat => own.has(coat.id) ? { ...coat, laidFrom: link(coat.id) } : coat)
}

/** The coats of a sequence under the ids by which a build-up knows them, where they were laid from it: so later layings can follow them. */
export function underItsIds(sequence: BuildUpSequence, body: Pick<SchemeBody, 'stack'>, buildUpId: string): BuildUpSequence {
  const known = new Map(coatsOf(body.stack).flatMap(({ id, laidFrom }) => laidFrom?.buildUpId === buildUpId ? [[id, laidFrom.coatId] as const] : []))
  const taken = new Set<string>()
  return {
    ...sequence,
    stack: sequence.stack.map((item) => {
      if (item.act !== 'coat') return item
      const id = known.get(item.coat.id) ?? item.coat.id
      // Laid twice, only the first is the build-up's coat.
      const free = taken.has(id) ? item.coat.id : id
      taken.add(free)
      return { act: 'coat', coat: { ...item.coat, id: free } }
    }),
  }
}

/**
 * Lays a build-up's present edition in place of what was laid from it before, with the masks that were on for nothing else.
 * A coat that was there before stays the same coat; what the painter changed in it by hand goes. `ids` are as many as `idsNeeded` says.
 */
export function takeOver(body: SchemeBody, layingId: string, { id, edition, sequence }: Origin, ids: readonly string[]): LayOutcome {
  const before = coatsOf(body.stack).filter(coat => coat.laidFrom?.layingId === layingId && coat.laidFrom.buildUpId === id)
  if (before.length === 0) return { ok: false, because: 'Nothing here was laid from that build-up any more.' }
  if (ids.length < idsNeeded(sequence)) throw new RangeError(`takeOver: ${ids.length} new ids for ${idsNeeded(sequence)} coats and masks`)
  const gone = new Set(before.map(coat => coat.id))
  const ownMasks = new Set(brackets(body).filter(({ coatIds }) => coatIds.length > 0 && coatIds.every(each => gone.has(each))).map(({ mask }) => mask.id))
  const stays = (item: SchemeBody['stack'][number]) => item.act === 'coat' ? !gone.has(item.coat.id) : !ownMasks.has(item.maskId)
  const first = body.stack.findIndex(item => !stays(item))
  const bare: SchemeBody = {
    ...body,
    stack: body.stack.filter(stays),
    masks: body.masks.filter(mask => !ownMasks.has(mask.id)),
  }
  const oldMasks = body.masks.filter(mask => ownMasks.has(mask.id))
  const used = new Set<string>()
  const again = (old: string | undefined, fresh: string) => {
    const chosen = old !== undefined && !used.has(old) ? old : fresh
    used.add(chosen)
    return chosen
  }
  const coats = coatsOf(sequence.stack)
  return layInto(bare, sequence, {
    row: body.stack.slice(0, first).filter(stays).length,
    onto: before[0]?.laidFrom?.onto ?? null,
    link: { buildUpId: id, edition, layingId },
    ids: [
      ...coats.map((coat, i) => again(before.find(each => each.laidFrom?.coatId === coat.id)?.id, ids[i]!)),
      // A mask is known again by its fitting.
      ...sequence.masks.map((mask, i) => again(oldMasks.find(old => old.seed === mask.seed && old.name === mask.name)?.id, ids[coats.length + i]!)),
    ],
  })
}
