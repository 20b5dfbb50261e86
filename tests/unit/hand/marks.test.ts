import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { flatOf, movedPlace, placeOfFlat, placeUnder, drawnAt } from '~/composables/hand/flat-blank'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { Coat } from '#shared/scheme/coat'
import { Mark, type Place, STROKES_MAX } from '#shared/scheme/mark'
import { layDot, layMark, layStrokes } from '#shared/scheme/mark-lay'
import { markParts, MARKS_MAX, partAt, withoutPart, withPlaces, withWidth } from '#shared/scheme/mark-parts'
import { distanceToPiece } from '#shared/scheme/outline/flat'
import { pressedEnds, pressedWidth, strokeAlong, TRACE_TOLERANCE, tracedLine, type TracePoint } from '#shared/scheme/outline/trace'

const blanks = ['minnow-90', 'deep-crank-62', 'glide-160'].map(name => prepareBlank(builtInBlank(name)))
const [blank] = blanks as [typeof blanks[number]]
const trace = (points: readonly Place[], pressure: (share: number) => number = () => 0.5): TracePoint[] =>
  points.map((place, i) => ({ place, flat: flatOf(blank, place), pressure: pressure(i / (points.length - 1)) }))
const wave = Array.from({ length: 300 }, (_, i): Place => [0.2 + 0.6 * i / 299, 0.5 + 0.2 * Math.sin(i / 20)])

describe.each(blanks.map(one => [one.shape.name, one] as const))('on %s', (_, body) => {
  it('finds the place that lies where a place was laid out flat', () => {
    fc.assert(fc.property(fc.double({ min: 0.03, max: 0.97, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }), (u, v) => {
      const back = flatOf(body, placeOfFlat(body, flatOf(body, [u, v])))
      const there = flatOf(body, [u, v])
      expect(Math.hypot(back[0] - there[0], back[1] - there[1])).toBeLessThan(0.02)
    }), { numRuns: 60 })
  })
  it('moves a place by mm and back again', () => {
    const there = movedPlace(body, [0.5, 0.4], 4, -2.5)
    const [u, v] = movedPlace(body, there, -4, 2.5)
    expect(u).toBeCloseTo(0.5, 3)
    expect(v).toBeCloseTo(0.4, 3)
    const [from, to] = [flatOf(body, [0.5, 0.4]), flatOf(body, there)]
    expect([to[0] - from[0], to[1] - from[1]].map(each => each.toFixed(2))).toEqual(['4.00', '-2.50'])
  })
  it('finds under the pointer what is drawn there', () => {
    const [u, v] = placeUnder(body, drawnAt(body, [0.4, 0.3]))
    expect(u).toBeCloseTo(0.4, 3)
    expect(v).toBeCloseTo(0.3, 3)
  })
})

it('keeps a drawn line within a tenth of a millimetre on the skin, with far fewer places', () => {
  const drawn = trace(wave)
  const line = tracedLine(drawn)!
  expect(line.tolerance).toBe(TRACE_TOLERANCE)
  expect(line.points.length).toBeLessThan(60)
  const kept = line.points.map(place => flatOf(blank, place))
  for (const { flat } of drawn) expect(Math.min(...kept.slice(1).map((to, i) => distanceToPiece(flat, kept[i]!, to)))).toBeLessThanOrEqual(TRACE_TOLERANCE + 1e-9)
})

it('takes a press that goes nowhere for no line', () => {
  expect(tracedLine(trace([[0.5, 0.5], [0.5, 0.5], [0.5001, 0.5]]))).toBeNull()
})

it('draws with a mouse as wide as set, and with a pen as it is pressed', () => {
  expect(pressedWidth(2, 0.5)).toBe(2)
  expect(pressedEnds(trace(wave), 2)).toEqual([2, 2])
  const [start, end] = pressedEnds(trace(wave, share => 1 - share), 2)
  expect(start).toBeGreaterThan(3)
  expect(end).toBeLessThan(1)
})

const line = strokeAlong([[0.2, 0.4], [0.8, 0.5]], [1, 1])

it('draws strokes of one tool on one sheet, and starts another when it is full', () => {
  let marks: Mark[] = []
  for (let i = 0; i <= STROKES_MAX; i++) {
    const laid = layStrokes(marks, 'airbrush', [line])
    if (!laid.ok) throw new Error(laid.because)
    marks = laid.marks
  }
  expect(marks.map(mark => mark.kind === 'strokes' && mark.strokes.length)).toEqual([STROKES_MAX, 1])
  expect(markParts(marks)).toHaveLength(STROKES_MAX + 1)
})

it('refuses one mark too many in words and leaves those there are', () => {
  const full: Mark[] = Array.from({ length: MARKS_MAX }, () => ({ kind: 'outline', points: [[0, 0], [0.1, 0], [0.1, 0.1]], soft: 0.3, wobble: 0, amount: 1 }))
  expect(layMark(full, full[0]!)).toMatchObject({ ok: false, because: expect.stringMatching(/at most 60 marks/) as string })
  expect(Coat.shape.marks.safeParse(full).success).toBe(true)
  expect(Coat.shape.marks.safeParse([...full, full[0]]).success).toBe(false)
})

describe('what is drawn can be changed afterwards', () => {
  const drawn = ['airbrush', 'brush'].reduce<Mark[]>((marks, tool) => {
    const laid = layStrokes(marks, tool as 'airbrush' | 'brush', [line, line])
    return laid.ok ? laid.marks : marks
  }, [])
  const dotted = layDot(drawn, [0.3, 0.4, 1], 0.1)
  const marks = dotted.ok ? dotted.marks : []

  it('each part is moved there and back, and the others stay', () => {
    for (const { at } of markParts(marks)) {
      const there = withPlaces(marks, at, place => movedPlace(blank, place, 3, 2))
      expect(there).not.toEqual(marks)
      const back = withPlaces(there, at, place => movedPlace(blank, place, -3, -2))
      partAt(back, at)!.points.forEach((place, i) => {
        const was = partAt(marks, at)!.points[i]!
        expect(place[0]).toBeCloseTo(was[0], 3)
        expect(place[1]).toBeCloseTo(was[1], 3)
      })
      for (const other of markParts(marks).filter(part => part.at !== at && (part.at.mark !== at.mark || part.at.part !== at.part))) expect(partAt(there, other.at)).toEqual(other)
    }
  })
  it('a width is held to what a tool can do, so that the draft stays valid', () => {
    for (const { at } of markParts(marks)) {
      for (const width of [[0, 1000], [1000, 0]] as const) expect(withWidth(marks, at, width).every(mark => Mark.safeParse(mark).success)).toBe(true)
    }
  })
  it('a part is taken out alone, and a mark left empty goes with it', () => {
    let left = marks
    for (let count = markParts(marks).length; count > 0; count--) {
      expect(markParts(left)).toHaveLength(count)
      left = withoutPart(left, markParts(left)[0]!.at)
    }
    expect(left).toEqual([])
  })
})
