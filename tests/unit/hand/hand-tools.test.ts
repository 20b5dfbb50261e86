import { describe, expect, it } from 'vitest'
import { flatOf } from '~/composables/hand/flat-blank'
import { draw, HAND_TOOLS, layReady, READY_MARKS, typedTrace, USUAL_SETTINGS } from '~/composables/hand/hand-tools'
import { partDrawer, partWords } from '~/composables/hand/part-drawing'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { fanStrokes } from '#shared/picture/deposit/mark-map'
import { Mark } from '#shared/scheme/mark'
import { markParts, withSide } from '#shared/scheme/mark-parts'

const blank = prepareBlank(builtInBlank('minnow-90'))

it.each(HAND_TOOLS)('lays a %s by typed places as a mark the draft can hold', (tool) => {
  const drawn = draw(blank, [], tool, USUAL_SETTINGS[tool], typedTrace(blank, tool, [0.3, 0.4], [0.6, 0.55]))
  if (!drawn.ok) throw new Error(drawn.because)
  expect(drawn.marks.map(mark => Mark.parse(mark))).toEqual(drawn.marks)
  expect(markParts(drawn.marks)[0]!.kind).toBe(tool)
  expect(drawn.said).toBeUndefined()
})

it('refuses a line that went nowhere with a way that works, and leaves the marks as they are', () => {
  const there = typedTrace(blank, 'airbrush line', [0.5, 0.5], [0.5, 0.5])
  for (const tool of HAND_TOOLS.filter(each => each !== 'dot')) expect(draw(blank, [], tool, USUAL_SETTINGS[tool], there)).toMatchObject({ ok: false })
})

it('spreads fin rays about the line the hand drew, as long as it drew it', () => {
  const trace = typedTrace(blank, 'fin rays', [0.35, 0.55], [0.45, 0.75])
  const drawn = draw(blank, [], 'fin rays', { ...USUAL_SETTINGS['fin rays'], rays: 3, spread: 40 }, trace)
  const fan = drawn.ok ? drawn.marks[0] : undefined
  if (fan?.kind !== 'fan') throw new Error('no fan')
  const [from, to] = [flatOf(blank, [0.35, 0.55]), flatOf(blank, [0.45, 0.75])]
  const middle = fanStrokes(from, fan, blank.shape.length)[1]!.points[1]!
  // A fan's rays are never quite as long as set: 3.5 % either way.
  expect(Math.hypot(middle[0] - to[0], middle[1] - to[1])).toBeLessThan(0.05 * Math.hypot(to[0] - from[0], to[1] - from[1]))
})

describe('marks that find their own place', () => {
  it.each(READY_MARKS)('the %s fits the draft', (what) => {
    const laid = layReady(blank, [], what)
    expect(laid.ok && laid.marks.every(mark => Mark.safeParse(mark).success)).toBe(true)
  })
  it('the rim runs round the iris, and the pupil lies within it', () => {
    const [iris, pupil, rim] = (['iris', 'pupil', 'rim of the eye'] as const).map((what) => {
      const laid = layReady(blank, [], what)
      return laid.ok ? markParts(laid.marks)[0]! : null
    })
    const middle = flatOf(blank, iris!.points[0]!)
    for (const place of rim!.points) {
      const [x, y] = flatOf(blank, place)
      expect(Math.hypot(x - middle[0], y - middle[1])).toBeCloseTo(blank.shape.eye.radius, 1)
    }
    expect(pupil!.width[0]).toBeLessThan(iris!.width[0])
    expect(pupil!.points).toEqual(iris!.points)
  })
})

it('draws each part once for as long as its mark stands, wherever it comes to stand', () => {
  const laid = layReady(blank, [], 'gill mark')
  const marks = laid.ok ? laid.marks : []
  const drawer = partDrawer(blank)
  const [first] = drawer(marks)
  const moved = drawer([{ kind: 'worm tracks', seed: 1, wavelength: 6, width: 1 }, ...marks])
  expect(moved.map(one => one.part.at)).toEqual([{ mark: 1, part: 0 }])
  expect(moved[0]!.line).toBe(first!.line)
  expect(partWords(first!.part)).toMatch(/^Dagger stroke, 1\.1 to 0\.5 mm, \d+ % along, \d+ % down$/)
})

it('draws on one side apart from what both sides carry, and turns it to both and back', () => {
  const trace = typedTrace(blank, 'airbrush line', [0.3, 0.4], [0.6, 0.5])
  const both = draw(blank, [], 'airbrush line', USUAL_SETTINGS['airbrush line'], trace)
  const left = draw(blank, both.ok ? both.marks : [], 'airbrush line', { ...USUAL_SETTINGS['airbrush line'], only: 'left' }, trace)
  if (!left.ok) throw new Error(left.because)
  expect(left.marks.map(mark => 'only' in mark ? mark.only : undefined)).toEqual([undefined, 'left'])
  expect(partWords(markParts(left.marks)[1]!)).toMatch(/, left side only$/)
  expect(withSide(withSide(left.marks, left.at, undefined), left.at, 'left')).toEqual(left.marks)
  expect(left.marks.map(mark => Mark.parse(mark))).toEqual(left.marks)
})
