import { describe, expect, it } from 'vitest'
import { drawnParts } from '#shared/blank/draw-parts'
import { BUILT_IN_BLANKS, builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { sideArea } from '#shared/blank/body-measures'
import { placeOnSurface } from '#shared/blank/surface-coordinates'
import { gillEdge } from '#shared/blank/zones'
import { contourAt } from '#shared/blank/profile'
import { projectPoint } from '#shared/blank/view'
import { fitView, PART_BODY, PART_FIN, PART_GAP, PART_NONE, samplesTransfer, subpixelSamples, viewSamples, type ViewSamples } from '#shared/blank/view-samples'

const minnow = prepareBlank(builtInBlank('minnow-90'))
const glide = prepareBlank(builtInBlank('glide-160'))
const SMALL = { width: 160, height: 80 }

function byPixel(samples: ViewSamples): Map<number, number> {
  const map = new Map<number, number>()
  for (let i = 0; i < samples.count; i++) if ((samples.part[i] ?? 0) < PART_FIN) map.set(samples.pixel[i] ?? 0, i)
  return map
}

describe('a view of a blank', () => {
  it.each(BUILT_IN_BLANKS.map(shape => [shape.name, shape] as const))('shows all of %s inside the picture, whichever way it is turned', (_, shape) => {
    const blank = prepareBlank(shape)
    for (const roll of [0, 37, 90, 180, 251]) {
      for (const nose of ['left', 'right'] as const) {
        const samples = viewSamples(blank, fitView(blank, { ...SMALL, roll, nose }))
        expect(samples.count).toBeGreaterThan(500)
        const sums = new Float32Array(SMALL.width * SMALL.height)
        for (let i = 0; i < samples.count; i++) {
          const pixel = samples.pixel[i] ?? 0
          sums[pixel] = (sums[pixel] ?? 0) + (samples.coverage[i] ?? 0)
        }
        const numbers = Array.from({ length: samples.count }, (_, i) => i)
        expect(numbers.filter(i => [0, SMALL.width - 1].includes((samples.pixel[i] ?? 0) % SMALL.width))).toEqual([])
        expect(numbers.filter(i => !(Math.abs(Math.hypot(...samples.normal.subarray(3 * i, 3 * i + 3)) - 1) < 1e-5))).toEqual([])
        expect(numbers.filter(i => !(Math.abs(Math.hypot(...samples.glossNormal.subarray(3 * i, 3 * i + 3)) - 1) < 1e-5))).toEqual([])
        expect(samples.occlusion.every(light => light > 0 && light <= 1)).toBe(true)
        expect(samples.u.every(share => share >= 0 && share <= 1)).toBe(true)
        expect(samples.v.every(share => share >= 0 && share <= 1)).toBe(true)
        expect(Math.max(...sums)).toBeLessThan(1.001)
      }
    }
  })
  it('is mirrored top to bottom when the blank is rolled half round', () => {
    const [left, right] = [0, 180].map(roll => viewSamples(minnow, { ...fitView(minnow, { ...SMALL, roll }), centreY: 40 })) as [ViewSamples, ViewSamples]
    const other = byPixel(right)
    let worst = 0
    expect(left.count).toBe(right.count)
    for (const [pixel, i] of byPixel(left)) {
      const row = Math.floor(pixel / SMALL.width)
      const j = other.get((SMALL.height - 1 - row) * SMALL.width + pixel % SMALL.width) ?? -1
      const [a, b] = [left.normal.subarray(3 * i, 3 * i + 3), right.normal.subarray(3 * j, 3 * j + 3)]
      const apart = Math.max(
        ...a.map((value, k) => Math.abs(value - (k === 1 ? -1 : 1) * (b[k] ?? Number.NaN))),
        Math.abs((right.V[j] ?? Number.NaN) - (left.V[i] ?? 0)),
        Math.abs((right.coverage[j] ?? Number.NaN) - (left.coverage[i] ?? 0)),
        Math.abs((right.side[j] ?? 0) + (left.side[i] ?? 0)),
      )
      worst = Math.max(worst, Number.isNaN(apart) ? Infinity : apart)
    }
    expect(worst).toBeLessThan(1e-3)
  })
  it('shows the back at 90°, the belly at 270°', () => {
    for (const [roll, low, high] of [[90, 0, 0.55], [270, 0.45, 1]] as const) {
      const samples = viewSamples(minnow, fitView(minnow, { ...SMALL, roll }))
      expect(samples.v.every(v => v >= low && v <= high)).toBe(true)
    }
  })
  it('puts places of the skin under the pixels they project to', () => {
    for (const roll of [0, 30, 300]) {
      const view = fitView(minnow, { width: 320, height: 160, roll })
      const samples = viewSamples(minnow, view)
      const pixels = byPixel(samples)
      for (const [u, v] of [[0.3, 0.4], [0.5, 0.55], [0.75, 0.45]] as const) {
        const place = placeOnSurface(minnow, u, v, 1)
        const [px, py] = projectPoint(view, 90, ...place.position)
        const i = pixels.get(Math.floor(py) * 320 + Math.floor(px)) ?? -1
        expect(Math.abs((samples.U[i] ?? Number.NaN) - place.U)).toBeLessThan(1.5 / view.scale)
        expect(Math.abs((samples.V[i] ?? Number.NaN) - place.V)).toBeLessThan(2.5 / view.scale)
      }
    }
  })
  it('covers as much of the picture as the body\'s outline holds, at any size', () => {
    const seen = [80, 160, 320].map((height) => {
      const view = fitView(minnow, { width: 2 * height, height })
      return viewSamples(minnow, view).coverage.reduce((sum, share) => sum + share, 0) / view.scale ** 2
    })
    for (const area of seen) expect(Math.abs(area / (seen[2] ?? 1) - 1)).toBeLessThan(0.004)
  })
  it('sees half the skin when every pixel is weighed by its slant', () => {
    const view = fitView(minnow, { width: 640, height: 320 })
    const samples = viewSamples(minnow, view)
    let area = 0
    for (let i = 0; i < samples.count; i++) {
      const facing = samples.bodyNormal[3 * i + 2] ?? 1
      area += (samples.coverage[i] ?? 0) / Math.max(0.05, facing) / view.scale ** 2
    }
    expect(Math.abs(2 * area / sideArea(minnow.profile) - 1)).toBeLessThan(0.05)
  })
  it('can be handed to a worker', () => {
    const samples = viewSamples(minnow, fitView(minnow, SMALL))
    const count = samples.count
    const moved = structuredClone(samples, { transfer: samplesTransfer(samples) })
    expect(moved.count).toBe(count)
    expect(moved.normal).toHaveLength(3 * count)
    expect(samples.normal).toHaveLength(0)
  })
})

describe('carving, fins and joints', () => {
  const view = fitView(glide, { width: 640, height: 320 })
  const samples = viewSamples(glide, view)
  it('tilt the light at the gill edge, but hardly the gloss', () => {
    let [most, gloss] = [0, 0]
    for (let i = 0; i < samples.count; i++) {
      const v = samples.v[i] ?? 0
      const fromEdge = Math.abs((samples.u[i] ?? 0) - gillEdge(glide.shape.gill, v))
      if (samples.part[i] !== PART_BODY || v < 0.4 || v > 0.6 || fromEdge > 0.005) continue
      const plain = samples.bodyNormal.subarray(3 * i, 3 * i + 3)
      const angle = (n: Float32Array) => Math.acos(Math.min(1, n.reduce((sum, value, k) => sum + value * (plain[k] ?? 0), 0)))
      most = Math.max(most, angle(samples.normal.subarray(3 * i, 3 * i + 3)))
      gloss = Math.max(gloss, angle(samples.glossNormal.subarray(3 * i, 3 * i + 3)))
    }
    expect(most).toBeGreaterThan(0.3)
    expect(gloss).toBeLessThan(0.3 * most)
  })
  it('run root to tip on every fin', () => {
    glide.fins.forEach((_, index) => {
      let [least, most, deepest] = [1, 0, 0]
      for (let i = 0; i < samples.count; i++) {
        if (samples.part[i] !== PART_FIN + index) continue
        least = Math.min(least, samples.rootToTip[i] ?? 1)
        most = Math.max(most, samples.rootToTip[i] ?? 0)
        deepest = Math.max(deepest, samples.rim[i] ?? 0)
      }
      expect(least).toBeLessThan(0.35)
      expect(most).toBeGreaterThan(0.95)
      expect(deepest).toBeGreaterThan(2)
    })
  })
  it('cut the outline through at a joint and darken it', () => {
    const gap: number[] = []
    for (let i = 0; i < samples.count; i++) if (samples.part[i] === PART_GAP) gap.push(i)
    expect(gap.length).toBeGreaterThan(100)
    const rows = gap.map(i => Math.floor((samples.pixel[i] ?? 0) / 640))
    const { back, belly } = { back: projectPoint(view, 160, 92, 21.5, 0)[1], belly: projectPoint(view, 160, 92, -21.5, 0)[1] }
    expect(Math.min(...rows)).toBeGreaterThan(back + 1)
    expect(Math.max(...rows)).toBeLessThan(belly - 1)
    // 3 mm below the line of the back the gap is still open to what lies behind the lure.
    const { back: line } = contourAt(glide.profile, 93.8)
    const [px, py] = projectPoint(view, 160, 92 + (line - 3) * (0.1 + 0.0016 * (line - 3)), line - 3, 0)
    const through = subpixelSamples(glide, view, Uint32Array.of(Math.floor(py) * 640 + Math.floor(px)), Float32Array.of(px % 1, py % 1))
    expect(through.part[0]).toBe(PART_NONE)
    // Hardly any light comes out of the gap's middle; toward its edges it does not end like a drawn line.
    const kept = gap.map(i => samples.occlusion[i] ?? 0).sort((a, b) => a - b)
    expect(kept[0]).toBeLessThan(0.27)
    expect(kept.at(-1)).toBeGreaterThan(0.6)
    expect(kept.at(-1)).toBeLessThan(1)
  })
})

describe('a fin on a rolled blank', () => {
  const shad = prepareBlank(builtInBlank('shad-80'))
  it('stands before the body on the side turned to the viewer, behind it on the other', () => {
    // The foot of the fin, well above the back: seen with the back toward the viewer and away from them.
    const places = [30, 330].map((roll) => {
      const view = fitView(shad, { width: 640, height: 320, roll })
      const [px, py] = projectPoint(view, 80, 31, 14, 0)
      const samples = viewSamples(shad, view)
      const pixel = Math.floor(py) * 640 + Math.floor(px)
      const parts: number[] = []
      for (let i = 0; i < samples.count; i++) if (samples.pixel[i] === pixel && (samples.coverage[i] ?? 0) > 0.5) parts.push(samples.part[i] ?? PART_NONE)
      const fine = subpixelSamples(shad, view, Uint32Array.of(pixel), new Float32Array([0.5, 0.5]))
      return { parts, fine: fine.part[0] }
    })
    expect(places).toEqual([{ parts: [PART_FIN], fine: PART_FIN }, { parts: [PART_BODY], fine: PART_BODY }])
  })
})

describe('sub-pixel samples', () => {
  const view = fitView(glide, { width: 320, height: 160 })
  const whole = viewSamples(glide, view)
  const middle = new Float32Array([0.5, 0.5])
  it('at pixel centres are the samples of the view', () => {
    const pixels = [...byPixel(whole)].filter(([, i]) => whole.coverage[i] === 1)
    const again = subpixelSamples(glide, view, Uint32Array.from(pixels, ([pixel]) => pixel), middle)
    expect(pixels.filter(([, i], k) => again.part[k] !== whole.part[i])).toEqual([])
    expect(pixels.filter(([, i], k) => !(Math.abs((again.U[k] ?? Number.NaN) - (whole.U[i] ?? 0)) < 1e-4))).toEqual([])
    expect(pixels.filter(([, i], k) => !(Math.abs((again.normal[3 * k + 1] ?? Number.NaN) - (whole.normal[3 * i + 1] ?? 0)) < 1e-3))).toEqual([])
  })
  it('agree with coverage on the outline', () => {
    const sums = new Map<number, number>()
    for (let i = 0; i < whole.count; i++) sums.set(whole.pixel[i] ?? 0, (sums.get(whole.pixel[i] ?? 0) ?? 0) + (whole.coverage[i] ?? 0))
    const edge = [...sums].filter(([, share]) => share > 0.01 && share < 0.99)
    const offsets = Float32Array.from({ length: 128 }, (_, k) => ((k & 1 ? k >> 4 : (k >> 1) & 7) + 0.5) / 8)
    const fine = subpixelSamples(glide, view, Uint32Array.from(edge, ([pixel]) => pixel), offsets)
    let miss = 0
    edge.forEach(([, share], i) => {
      miss += Math.abs(share - fine.coverage.subarray(64 * i, 64 * i + 64).reduce((sum, one) => sum + one, 0) / 64)
    })
    expect(edge.length).toBeGreaterThan(200)
    expect(miss / edge.length).toBeLessThan(0.06)
  })
  it('find nothing beside the lure', () => {
    const beside = subpixelSamples(glide, view, Uint32Array.of(0, 319, 320 * 159), middle)
    expect([...beside.part]).toEqual([PART_NONE, PART_NONE, PART_NONE])
    expect([...beside.coverage]).toEqual([0, 0, 0])
  })
})

describe('eyes, lip and wire', () => {
  const shad = prepareBlank(builtInBlank('shad-80'))
  it('show one round eye from the side, two from above, where the shape has them', () => {
    const view = fitView(shad, { width: 640, height: 320 })
    const { eyes } = drawnParts(shad, view)
    expect(eyes).toHaveLength(1)
    const [eye] = eyes
    const expected = projectPoint(view, 80, 10, 3.4, 0)
    expect(eye?.centre[0]).toBeCloseTo(expected[0], 3)
    expect(eye?.centre[1]).toBeCloseTo(expected[1], 3)
    expect(eye?.facing[2]).toBeGreaterThan(0.7)
    expect(eye?.up[1]).toBeGreaterThan(0.7)
    expect(drawnParts(shad, fitView(shad, { width: 640, height: 320, roll: 90 })).eyes).toHaveLength(2)
    expect(drawnParts(shad, fitView(shad, { width: 640, height: 320, roll: 180, nose: 'right' })).eyes[0]?.side).toBe(-1)
  })
  it('turn a picture place on the rim of the eye into radius 1', () => {
    const view = fitView(shad, { width: 640, height: 320, roll: 25 })
    const [eye] = drawnParts(shad, view).eyes
    if (!eye) throw new Error('the eye faces the viewer')
    const [a, b, c, d] = eye.inverse
    const [dx, dy] = [eye.toTail[0] * eye.radius * view.scale, -eye.toTail[1] * eye.radius * view.scale]
    expect(a * dx + b * dy).toBeCloseTo(1, 9)
    expect(c * dx + d * dy).toBeCloseTo(0, 9)
    const [ux, uy] = [eye.up[0] * eye.radius * view.scale, -eye.up[1] * eye.radius * view.scale]
    expect(a * ux + b * uy).toBeCloseTo(0, 9)
    expect(c * ux + d * uy).toBeCloseTo(1, 9)
  })
  it('show the lip as a bar from the side and as a plate from below', () => {
    const span = (roll: number) => {
      const lip = drawnParts(shad, fitView(shad, { width: 640, height: 320, roll, scale: 5 })).lip
      return { ...lip, tall: Math.hypot((lip?.corners[0][0] ?? 0) - (lip?.corners[1][0] ?? 0), (lip?.corners[0][1] ?? 0) - (lip?.corners[1][1] ?? 0)) / 5 }
    }
    expect(span(0).tall).toBeCloseTo(1.6, 6)
    expect(span(0).isInFront).toBe(false)
    expect(span(270).tall).toBeGreaterThan(12.9)
    expect(span(270).isInFront).toBe(true)
  })
  it('hang a ring at every hanger and one for the line, and two pins in a joint', () => {
    const parts = drawnParts(glide, fitView(glide, { width: 640, height: 320 }))
    expect(parts.rings.map(ring => ring.kind)).toEqual(['tie', 'hanger', 'hanger'])
    expect(parts.pins).toHaveLength(2)
    expect(parts.rings.every(ring => !ring.isInFront)).toBe(true)
    expect(drawnParts(glide, fitView(glide, { width: 640, height: 320, roll: 270 })).rings[1]?.isInFront).toBe(true)
  })
})
