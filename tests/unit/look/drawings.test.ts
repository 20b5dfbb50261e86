import { describe, expect, it } from 'vitest'
import { boxRound, closedLine, PLAIN_BLANK } from '~/components/ui/blank-line'
import { DISTANCE_MARKS, placeOnAxis } from '~/components/ui/distance-axis'
import { ICON_NAMES, ICONS } from '~/components/ui/icons'
import { isIn, PLACES, placesFor } from '~/components/shell/places'

describe('line drawings', () => {
  it.each(ICON_NAMES)('%s is a drawing on the 24 grid, with nothing filled', (name) => {
    expect(ICONS[name].line).toMatch(/^M[-\d.]+ ?[-\d.]+[MmLlHhVvCcSsAaZz\d .-]+$/)
  })
})

describe('the outline of a blank', () => {
  it('goes through every point it is given and closes', () => {
    const line = closedLine(PLAIN_BLANK)
    const ends = [...line.matchAll(/C(?:[-\d.]+ ){4}([-\d.]+) ([-\d.]+)/g)].map(end => [Number(end[1]), Number(end[2])])
    expect(ends).toEqual([...PLAIN_BLANK.slice(1), PLAIN_BLANK[0]])
    expect(line.endsWith('Z')).toBe(true)
  })

  it('needs three points to be a shape', () => {
    expect(() => closedLine([[0, 0], [1, 0]])).toThrow(RangeError)
  })

  it('stands in a box with the margin asked for', () => {
    expect(boxRound([[0, -10], [100, 0], [50, 10]], 5)).toBe('-5 -15 110 30')
  })
})

describe('the axis of colour distance', () => {
  it('gives the first steps, where everything matters, most of the room', () => {
    const [one, redo, eight, far] = DISTANCE_MARKS.map(placeOnAxis)
    expect(placeOnAxis(0)).toBe(0)
    expect(one).toBeGreaterThan(0.2)
    expect(redo).toBeGreaterThan(3.5 / 24 * 2)
    expect(eight).toBeGreaterThan(0.5)
    expect(far).toBeLessThan(1)
    expect(placeOnAxis(4) / placeOnAxis(1)).toBeCloseTo(2, 12)
  })

  it('keeps what lies farther at its far end, and refuses what is no distance', () => {
    expect(placeOnAxis(80)).toBe(1)
    expect(() => placeOnAxis(-1)).toThrow(RangeError)
    expect(() => placeOnAxis(Number.NaN)).toThrow(RangeError)
  })
})

describe('the places', () => {
  it('show the front desk no way to a recipe, a paint or a run', () => {
    expect(placesFor('desk').map(place => place.word)).toEqual(['Schemes', 'Blanks', 'Cards', 'Workshop'])
  })

  it('show the owner all of them, and nobody any', () => {
    expect(placesFor('owner')).toEqual(PLACES)
    expect(placesFor(null)).toEqual([])
  })

  it('know that a paint lies on the shelf and that a lookalike path does not', () => {
    const shelf = PLACES.find(place => place.word === 'Shelf')!
    expect(isIn(shelf, '/shelf/paints/7')).toBe(true)
    expect(isIn(shelf, '/shelf-life')).toBe(false)
  })
})
