import { describe, expect, it } from 'vitest'
import { coatShifts, doingBetween, firstSeen, goesOnWith, nextSeen, shiftsSentence, shiftWords, shiftZones } from '~/composables/build/film-shift'
import type { ZoneName } from '#shared/blank/zone-names'
import type { Lab } from '#shared/optics/colorimetry'
import type { SchemeBody } from '#shared/scheme/body'
import { body, id } from '../scheme/bodies'

const c = (n: number) => id('coat', n)
type Zone = Parameters<typeof coatShifts>[0][number]

/** A zone whose ground and coats are seen at these lightnesses, from the ground up. */
const zone = (name: ZoneName, ground: number, ...coats: [n: number, L: number][]): Zone => ({
  zone: name, label: name, wayUp: [{ coatId: null, lab: [ground, 0, 0] as Lab }, ...coats.map(([n, L]) => ({ coatId: c(n), lab: [L, 0, 0] as Lab }))],
})
const flank = (...coats: [number, number][]) => [zone('upper-flank', 90, ...coats)]
const passes = (of: SchemeBody, n: number, count: number): SchemeBody => ({
  ...of, stack: of.stack.map(item => item.act === 'coat' && item.coat.id === c(n) ? { act: 'coat', coat: { ...item.coat, passes: count } } : item),
})
const far = (shifts: ReturnType<typeof coatShifts>) => shifts.map(({ coatId, zones }) => [Number(coatId.slice(-12)), zones.length])

describe('the coats above a change', () => {
  it('are those that are seen otherwise, never the one that was changed', () => {
    const shifts = coatShifts(flank([1, 80], [2, 60], [3, 10]), flank([1, 70], [2, 55], [3, 10]), { coatIds: new Set([c(1)]) }, [c(1), c(2), c(3)])
    expect(far(shifts)).toEqual([[2, 1]])
    expect(shifts[0]?.zones[0].distance).toBeCloseTo(4.9, 0)
  })

  it('carry their distance zone by zone, the farthest first', () => {
    const before = [zone('back', 90, [1, 80], [2, 60]), zone('belly', 90, [1, 80], [2, 60]), zone('tail', 90, [2, 40])]
    const after = [zone('back', 90, [1, 70], [2, 58]), zone('belly', 90, [1, 50], [2, 45]), zone('tail', 90, [2, 40])]
    const [shift] = coatShifts(before, after, { coatIds: new Set([c(1)]) }, [c(1), c(2)])
    expect(shift?.zones.map(each => each.label)).toEqual(['belly', 'back'])
    expect(shiftWords(shift!)).toMatch(/^changed 1\d\.\d, most on the belly$/)
    expect(shiftZones(shift!)).toMatch(/^belly 1\d\.\d and back 1\.\d$/)
  })

  it('are none where nothing changed, and none that nobody could tell apart', () => {
    const zones = flank([1, 80], [2, 60])
    expect(coatShifts(zones, zones, { coatIds: new Set() }, [c(1), c(2)])).toEqual([])
    expect(coatShifts(zones, flank([1, 80], [2, 60.3]), { coatIds: new Set() }, [c(1), c(2)])).toEqual([])
  })

  it('are left out where only one of the two has the zone or the coat', () => {
    expect(coatShifts(flank([1, 80]), [...flank([1, 80], [2, 10]), zone('belly', 20, [1, 10])], { coatIds: new Set() }, [c(1), c(2)])).toEqual([])
  })

  it('are said in one sentence with the farthest of them', () => {
    const shifts = coatShifts(flank([1, 80], [2, 60], [3, 40]), flank([1, 80], [2, 50], [3, 38]), { coatIds: new Set() }, [c(1), c(2), c(3)])
    expect(shiftsSentence(shifts, coatId => `Coat ${Number(coatId.slice(-12))}`)).toMatch(/^2 coats look otherwise now, most of all Coat 2: upper-flank \d+\.\d\.$/)
    expect(shiftsSentence([], () => '')).toBe('')
  })
})

describe('what the hand did', () => {
  it('is nothing where only a name changed', () => {
    const renamed: SchemeBody = { ...body(1), stack: body(1).stack.map(item => item.act === 'coat' ? { act: 'coat', coat: { ...item.coat, name: 'Glaze' } } : item) }
    expect(doingBetween(body(1), renamed, null)).toBeNull()
    expect(doingBetween(body(1), body(1), null)).toBeNull()
  })

  it('tells two neighbours that changed places apart by the one in hand', () => {
    expect([...doingBetween(body(1, 2, 3), body(2, 1, 3), c(1))!.coatIds]).toEqual([c(1)])
    expect([...doingBetween(body(1, 2, 3), body(2, 1, 3), c(2))!.coatIds]).toEqual([c(2)])
    // A hand elsewhere carried nothing here.
    expect(doingBetween(body(1, 2, 3), body(2, 1, 3), c(3))!.coatIds.size).toBe(1)
    expect(doingBetween(body(1, 2, 3), body(2, 1, 3), c(3))!.coatIds.has(c(3))).toBe(false)
  })

  it('is a coat laid between others, or taken out', () => {
    expect([...doingBetween(body(1, 2), body(1, 3, 2), c(3))!.coatIds]).toEqual([c(3)])
    expect(doingBetween(body(1, 3, 2), body(1, 2), c(1))!.coatIds.size).toBe(0)
  })
})

describe('what is shown', () => {
  const start = firstSeen({ body: body(1, 2), zones: flank([1, 80], [2, 60]) })
  const step = (count: number, L: number, from = start) => nextSeen(from, { body: passes(body(1, 2), 1, count), zones: flank([1, 50], [2, L]) }, c(1))
  const distance = (state: typeof start) => state.shifts[0]?.zones[0].distance ?? 0

  it('is measured from where a dragged slider began', () => {
    const [two, three] = [step(4, 58), step(5, 50, step(4, 58))]
    expect(distance(three)).toBeGreaterThan(3 * distance(two))
    expect(three.from).toBe(start.from)
  })

  it('is measured anew when something else is done', () => {
    const first = step(4, 50)
    const then = nextSeen(first, { body: passes(first.last.body, 2, 9), zones: flank([1, 50], [2, 20]) }, c(2))
    expect(then.from).toBe(first.last)
    expect(then.shifts).toEqual([])
  })

  it('goes when the change is taken back, and stands in another light until something is done', () => {
    expect(nextSeen(step(4, 50), { body: body(1, 2), zones: flank([1, 80], [2, 60]) }, c(1)).shifts).toEqual([])
    const first = step(4, 50)
    const dim = nextSeen(first, { body: first.last.body, zones: flank([1, 10], [2, 10]) }, c(1))
    expect(dim.shifts).toEqual(first.shifts)
    expect(goesOnWith(dim, passes(body(1, 2), 1, 6), c(1))).toBe(false)
    expect(nextSeen(dim, { body: passes(body(1, 2), 1, 6), zones: flank([1, 9], [2, 10]) }, c(1)).shifts).toEqual([])
  })

  it('stands while the hand goes on with the same thing, and no longer', () => {
    const first = step(4, 50)
    expect(goesOnWith(first, passes(body(1, 2), 1, 6), c(1))).toBe(true)
    expect(goesOnWith(first, passes(passes(body(1, 2), 1, 4), 2, 6), c(2))).toBe(false)
    expect(goesOnWith(first, body(1, 2), c(1))).toBe(false)
  })
})
