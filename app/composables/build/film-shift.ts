import { deltaE2000 } from '#shared/optics/delta-e'
import type { CoatColour, ZoneColour } from '#shared/picture/zone-colours'
import type { SchemeBody } from '#shared/scheme/body'
import { sameValue } from '#shared/scheme/canonical'
import { listWords } from '#shared/scheme/coat-words'
import { diffBodies } from '#shared/scheme/diff'
import { coatsOf } from '#shared/scheme/stack-order'

/** How far the colour seen on a coat went in one zone, CIEDE2000. */
export interface ZoneShift { label: string, distance: number }

/** What became of the colour seen on a coat that was itself left alone. */
export interface CoatShift { coatId: string, /** The zones in which it can be told, the farthest first. */ zones: readonly [ZoneShift, ...ZoneShift[]] }

/** What the hand did between two bodies. */
export interface Doing {
  /** Coats that were laid, changed or carried: not what follows from it. */
  coatIds: ReadonlySet<string>
  /** What goes on while this stays the same: a slider that is dragged, a coat that is carried row by row. */
  key: string
}

/** Less than this nobody tells apart, even side by side. */
export const SHIFT_LEAST = 0.5

type Zone = Pick<ZoneColour, 'zone' | 'label'> & { wayUp: readonly Pick<CoatColour, 'coatId' | 'lab'>[] }

function carried(before: SchemeBody, after: SchemeBody, moved: readonly string[], inHand: string | null): readonly string[] {
  if (moved.length === 0 || inHand === null) return moved
  // Two neighbours that changed places: the one in hand was carried, the other gave way.
  const others = (body: SchemeBody) => coatsOf(body.stack).map(coat => coat.id).filter(id => id !== inHand)
  const [was, is] = [others(before), others(after)]
  const both = (ids: string[], there: string[]) => ids.filter(id => there.includes(id))
  return sameValue(both(was, is), both(is, was)) ? [inHand] : moved
}

/**
 * What was done between two bodies, as far as coats are concerned; null when nothing was that could change a colour.
 * @param inHand the coat the painter holds, which tells two neighbours that changed places apart
 */
export function doingBetween(before: SchemeBody, after: SchemeBody, inHand: string | null): Doing | null {
  const diff = diffBodies(before, after)
  const moved = carried(before, after, diff.moved.map(move => move.coatId), inHand)
  const changed = diff.changed.filter(({ fields }) => fields.some(field => field !== 'name' && field !== 'note' && field !== 'laidFrom'))
  const parts = [
    ...diff.added.map(coat => `laid ${coat.id}`), ...diff.takenOut.map(coat => `out ${coat.id}`), ...moved.map(id => `moved ${id}`),
    ...changed.map(({ coatId, fields }) => `changed ${coatId} ${fields.join(' ')}`),
    ...[...diff.masksAdded, ...diff.masksTakenOut].map(mask => `mask ${mask.id}`), ...diff.masksChanged.map(each => `mask ${each.maskId} ${each.fields.join(' ')}`),
    ...diff.masksSpanned.map(each => `span ${each.maskId}`),
    ...diff.ground ? ['ground'] : [], ...diff.blankId ? ['blank'] : [],
  ]
  if (parts.length === 0) return null
  return { key: parts.join(', '), coatIds: new Set([...diff.added.map(coat => coat.id), ...moved, ...changed.map(each => each.coatId)]) }
}

/**
 * Which coats are seen in another colour than before, though nobody touched them: those whose ground changed. From the ground up as they
 * now lie, the distance by zone; zones and coats that only one of the two has are left out.
 */
export function coatShifts(before: readonly Zone[], after: readonly Zone[], { coatIds }: Pick<Doing, 'coatIds'>, order: readonly string[]): CoatShift[] {
  const found = new Map<string, ZoneShift[]>()
  for (const zone of after) {
    const was = new Map(before.find(each => each.zone === zone.zone)?.wayUp.map(step => [step.coatId, step.lab]))
    for (const { coatId, lab } of zone.wayUp) {
      const earlier = was.get(coatId)
      if (coatId === null || coatIds.has(coatId) || !earlier) continue
      const distance = deltaE2000(earlier, lab)
      if (distance >= SHIFT_LEAST) found.set(coatId, [...found.get(coatId) ?? [], { label: zone.label, distance }])
    }
  }
  return order.flatMap((coatId): CoatShift[] => {
    const [most, ...rest] = found.get(coatId)?.sort((a, b) => b.distance - a.distance) ?? []
    return most ? [{ coatId, zones: [most, ...rest] }] : []
  })
}

const zoneWords = ({ label, distance }: ZoneShift) => `${label.toLowerCase()} ${distance.toFixed(1)}`

/** "changed 3.4, most on the upper flank": what a screen reader adds to a row. */
export function shiftWords({ zones: [most] }: CoatShift): string {
  return `changed ${most.distance.toFixed(1)}, most on the ${most.label.toLowerCase()}`
}

/** A coat's distances in all its zones: "upper flank 3.4, back 1.2". */
export function shiftZones({ zones }: CoatShift): string {
  return listWords(zones.map(zoneWords))
}

/** All of it in one sentence; empty when nothing changed. */
export function shiftsSentence(shifts: readonly CoatShift[], titleOf: (coatId: string) => string): string {
  const [first, ...rest] = shifts
  if (!first) return ''
  const most = rest.reduce((far, each) => each.zones[0].distance > far.zones[0].distance ? each : far, first)
  const count = shifts.length === 1 ? '1 coat looks' : `${shifts.length} coats look`
  return `${count} otherwise now, ${shifts.length === 1 ? titleOf(most.coatId) : `most of all ${titleOf(most.coatId)}`}: ${zoneWords(most.zones[0])}.`
}

/** What was seen of one body. */
export interface SeenBody<Z extends Zone = Zone> { body: SchemeBody, zones: readonly Z[] }

/** Where a painter stands between two doings: what the film looked like before the present one, and what was seen last. */
export interface ShiftState {
  from: SeenBody
  last: SeenBody
  doing: Doing | null
  shifts: readonly CoatShift[]
  /** The body before what is shown: back at it, nothing is changed. */
  origin: SchemeBody
}

/** The first look at a film: nothing was done yet. */
export function firstSeen(seen: SeenBody): ShiftState {
  return { from: seen, last: seen, doing: null, shifts: [], origin: seen.body }
}

/**
 * Takes in what is seen of the newest body. What goes on is measured from where it began, something new from what was seen last.
 * The same body seen otherwise has other paints or stands in another light: no doing of the hand. What is shown stands, and is measured anew.
 */
export function nextSeen(state: ShiftState, seen: SeenBody, inHand: string | null): ShiftState {
  if (seen.body === state.last.body) return { ...firstSeen(seen), shifts: state.shifts, origin: state.origin }
  if (doingBetween(state.origin, seen.body, inHand) === null) return firstSeen(seen)
  const onward = doingBetween(state.from.body, seen.body, inHand)
  const goesOn = state.doing === null || onward === null || onward.key === state.doing.key
  const from = goesOn ? state.from : state.last
  const doing = goesOn ? onward : doingBetween(from.body, seen.body, inHand)
  const order = coatsOf(seen.body.stack).map(coat => coat.id)
  return { from, last: seen, doing, shifts: doing ? coatShifts(from.zones, seen.zones, doing, order) : [], origin: goesOn ? state.origin : from.body }
}

/** Whether what is shown still belongs to what is being done: the same doing, further on. */
export function goesOnWith({ from, doing }: ShiftState, body: SchemeBody, inHand: string | null): boolean {
  return doing !== null && doingBetween(from.body, body, inHand)?.key === doing.key
}
