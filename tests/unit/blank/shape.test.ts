import { describe, expect, it } from 'vitest'
import { BlankDimensions, blankFromDimensions } from '#shared/blank/blank-from-dimensions'
import { BlankShape } from '#shared/blank/blank-shape'
import { bodyMeasures } from '#shared/blank/body-measures'
import { BUILT_IN_BLANKS, builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { profileOf } from '#shared/blank/profile'
import { sideOutline, svgPath } from '#shared/blank/side-outline'
import { toHundredth } from '#shared/blank/to-hundredth'
import { zoneOutline } from '#shared/blank/zone-outline'
import { BODY_ZONES, finZone } from '#shared/blank/zones'

function refusal(change: (shape: BlankShape) => unknown): string {
  const answer = BlankShape.safeParse(change(structuredClone(builtInBlank('shad-80'))))
  return answer.success ? '' : answer.error.issues.map(issue => issue.message).join('; ')
}

describe('a blank shape', () => {
  it('survives being written down and read again', () => {
    for (const shape of BUILT_IN_BLANKS) expect(BlankShape.parse(JSON.parse(JSON.stringify(shape)))).toEqual(shape)
  })
  it.each([
    [(s: BlankShape) => ({ ...s, length: 500 }), 'at most 400 mm'],
    [(s: BlankShape) => ({ ...s, stations: s.stations.slice(0, 4) }), 'at least 5 stations'],
    [(s: BlankShape) => ({ ...s, stations: s.stations.toReversed() }), 'from nose to tail'],
    [(s: BlankShape) => ({ ...s, stations: s.stations.slice(1) }), 'the first station is at 0'],
    [(s: BlankShape) => ({ ...s, stations: s.stations.map((one, i) => i === 3 ? { ...one, top: -20 } : one) }), 'the back lies above the belly'],
    [(s: BlankShape) => ({ ...s, stations: s.stations.map((one, i) => i === 3 ? { ...one, halfWidth: 0 } : one) }), 'has height and width'],
    [(s: BlankShape) => ({ ...s, stations: s.stations.map((one, i) => i === 0 ? { ...one, halfWidth: 2 } : one) }), 'either closed'],
    [(s: BlankShape) => ({ ...s, stations: s.stations.map((one, i) => i === 3 ? { ...one, egg: 0.6 } : one) }), 'egg is less than 0.5'],
    [(s: BlankShape) => ({ ...s, fins: [...s.fins, ...s.fins] }), 'its own id'],
    [(s: BlankShape) => ({ ...s, joints: [{ x: 90, lean: 0, bow: 0, gap: 1, round: 2 }] }), 'between nose and tail'],
    [(s: BlankShape) => ({ ...s, gill: { ...s.gill, top: 0.9 } }), 'from its top down'],
  ])('is refused with a reason (%#)', (change, reason) => {
    expect(refusal(change)).toContain(reason)
  })
})

describe('the built-in blanks', () => {
  // Length, height, width mm; area cm²; volume cm³.
  it.each([
    ['minnow-90', 90, 17.5, 13.1, 31.6, 9.44],
    ['slim-115', 115, 18.2, 12.9, 41.4, 12.57],
    ['shad-80', 80, 25.7, 15.0, 36.9, 13.74],
    ['deep-crank-62', 62, 25.7, 21.1, 34.0, 15.13],
    ['flat-crank-60', 60, 20.4, 11.3, 23.6, 7.04],
    ['glide-160', 160, 46.1, 27.3, 133.7, 91.1],
    ['two-joint-swimmer-180', 180, 38.3, 29.3, 135.6, 87.5],
    ['pencil-110', 110, 19.4, 18.6, 51.2, 20.2],
    ['jerk-130', 130, 33.9, 24.1, 92.9, 54.2],
  ])('%s has the size it is drawn with', (name, length, height, width, area, volume) => {
    const size = bodyMeasures(profileOf(builtInBlank(name)))
    expect(size.length).toBe(length)
    expect(Math.abs(size.height - height)).toBeLessThan(0.06)
    expect(Math.abs(size.width - width)).toBeLessThan(0.06)
    expect(Math.abs(size.area / 100 - area)).toBeLessThan(0.06)
    expect(Math.abs(size.volume / 1000 / volume - 1)).toBeLessThan(0.0015)
  })
  it('are nine, each with its own name', () => {
    expect(new Set(BUILT_IN_BLANKS.map(shape => shape.name)).size).toBe(9)
    expect(() => builtInBlank('torpedo-1')).toThrow(RangeError)
  })
})

describe('a blank from caliper measures', () => {
  const wish = BlankDimensions.parse({ name: 'our-shad', label: 'Our shad', form: 'shad-80', length: 120, height: 30, width: 20 })
  it('has exactly the length, height and width measured', () => {
    const size = bodyMeasures(profileOf(blankFromDimensions(wish)))
    expect(size.length).toBe(120)
    expect(size.height).toBeCloseTo(30, 9)
    expect(size.width).toBeCloseTo(20, 9)
    const form = bodyMeasures(profileOf(builtInBlank('shad-80')))
    expect(size.volume / form.volume).toBeCloseTo(120 * 30 * 20 / (form.length * form.height * form.width), 9)
  })
  it('is the form itself at the form\'s own size', () => {
    const form = builtInBlank('glide-160')
    const size = bodyMeasures(profileOf(form))
    const copy = blankFromDimensions({ ...wish, form: form.name, name: form.name, label: form.label, length: size.length, height: size.height, width: size.width })
    expect(copy.joints[0]?.x).toBeCloseTo(form.joints[0]?.x ?? 0, 9)
    copy.fins.forEach((fin, i) => {
      expect(fin.rays?.toAngle).toBeCloseTo(form.fins[i]?.rays?.toAngle ?? 0, 9)
      expect(fin.outline[2]?.[1]).toBeCloseTo(form.fins[i]?.outline[2]?.[1] ?? 0, 9)
    })
  })
  it('can be had without lip, fins and joints', () => {
    const bare = blankFromDimensions({ ...wish, hasLip: false, hasFins: false, hasJoints: false })
    expect(bare.lip).toBeUndefined()
    expect(bare.fins).toEqual([])
    expect(bare.joints).toEqual([])
  })
  it('needs a form that exists', () => {
    expect(() => blankFromDimensions({ ...wish, form: 'none' })).toThrow(RangeError)
  })
})

describe('line drawings', () => {
  const shape = builtInBlank('shad-80')
  const outline = sideOutline(shape)
  it('hold the whole lure in their box', () => {
    const { box } = outline
    for (const [x, y] of [...outline.body, ...outline.fins.flatMap(fin => fin.points), ...(outline.lip ?? [])]) {
      expect(x).toBeGreaterThanOrEqual(box.x)
      expect(x).toBeLessThanOrEqual(toHundredth(box.x + box.width))
      expect(y).toBeGreaterThanOrEqual(box.y)
      expect(y).toBeLessThanOrEqual(toHundredth(box.y + box.height))
    }
  })
  it('are in hundredths, so that the server and the browser draw the same figures', () => {
    const { box, eye, rings, body, joints, mouth, lip, fins } = outline
    const points = [body, mouth, lip ?? [], ...joints, ...fins.map(fin => fin.points), ...BODY_ZONES.map(zone => zoneOutline(prepareBlank(shape), zone))]
    const figures = [...Object.values(box), ...Object.values(eye), ...rings.flatMap(ring => Object.values(ring)), ...points.flat(2)]
    expect(figures.filter(figure => figure !== toHundredth(figure))).toEqual([])
  })
  it('show the back above the belly, as SVG counts', () => {
    const back = outline.body.find(([x]) => x > 30)?.[1] ?? 0
    const belly = outline.body.findLast(([x]) => x > 30)?.[1] ?? 0
    expect(back).toBeLessThan(belly)
    expect(svgPath([[0, 0], [1.234, -2]])).toBe('M0 0L1.23 -2Z')
  })
  it('outline every zone inside the body, and each fin', () => {
    const blank = prepareBlank(shape)
    const [low, high] = [Math.min(...outline.body.map(([, y]) => y)), Math.max(...outline.body.map(([, y]) => y))]
    for (const zone of BODY_ZONES) {
      const points = zoneOutline(blank, zone)
      expect(points.length).toBeGreaterThan(40)
      for (const [x, y] of points) {
        expect(x).toBeGreaterThan(-0.01)
        expect(x).toBeLessThan(80.01)
        expect(y).toBeGreaterThan(low - 0.05)
        expect(y).toBeLessThan(high + 0.05)
      }
    }
    expect(zoneOutline(blank, finZone('dorsal'))).toEqual(outline.fins[0]?.points)
    expect(zoneOutline(blank, finZone('wing'))).toEqual([])
  })
})
