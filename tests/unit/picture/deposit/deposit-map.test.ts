import { describe, expect, it } from 'vitest'
import { PART_BODY, PART_FIN, type ViewSamples } from '#shared/blank/view-sample-lists'
import { depositKeep, depositMap, depositOf } from '#shared/picture/deposit-map'
import { layCoat } from '#shared/picture/deposit/lay-coat'
import type { Coat } from '#shared/scheme/coat'
import type { Mask } from '#shared/scheme/mask'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { coatOf, id, maskOf, mean, minnow, samplesAt, seen, shad } from './bench'

const lay = (samples: ViewSamples, blank: PreparedBlank, coat: Coat, masks: Mask[] = []) => layCoat(depositKeep(samples, blank), { coat, masks }).slice()
const back = coatOf({ gun: { aim: 'from', angle: 22, footprint: 0.75 }, where: { zones: ['back', 'upper flank'], reach: -1, fade: 9 } })
const net = maskOf({ kind: 'mesh', weave: 'hexagon', pitch: 2, thread: 0.32 })

describe('deposit of a coat', () => {
  it('does not know passes or paint: both stand beside the map', () => {
    const keep = depositKeep(seen(minnow, 160), minnow)
    const once = depositMap(keep, { coat: back, masks: [] })
    const often = { ...back, passes: 7, mix: { parts: [{ paintId: id(3), drops: 4 }], reducer: 9 } }
    expect(depositMap(keep, { coat: often, masks: [] })).toEqual(once)
  })

  it('is the same each time, from a used keep and from a new one', () => {
    const view = seen(minnow, 160)
    const keep = depositKeep(view, minnow)
    const first = depositMap(keep, { coat: back, masks: [net] })
    depositMap(keep, { coat: coatOf({ id: id(2), where: { zones: ['belly'] } }), masks: [] })
    expect(depositMap(keep, { coat: back, masks: [net] })).toEqual(first)
    expect(depositMap(depositKeep(view, minnow), { coat: back, masks: [net] })).toEqual(first)
  })

  it('another coat alike in all but its id differs only as two passes of one hand do', () => {
    const view = seen(minnow, 160)
    const [a, b] = [lay(view, minnow, back), lay(view, minnow, { ...back, id: id(8) })]
    expect(a).not.toEqual(b)
    expect(mean(a)).toBeCloseTo(mean(b), 1)
  })

  it('sits on the skin: the same places give the same paint in whatever view and order they come', () => {
    const places = Array.from({ length: 60 }, (_, i) => [0.2 + 0.01 * i, 0.1 + (0.013 * i) % 0.8] as const)
    const forth = lay(samplesAt(minnow, places), minnow, back, [net])
    const turned = lay(samplesAt(minnow, places.toReversed()), minnow, back, [net]).toReversed()
    expect(turned).toEqual(forth)
  })

  it.each([['a fade', back, []], ['a net', { ...back, where: { ...back.where, zones: ['trunk' as const] } }, [net]]] as [string, Coat, Mask[]][])(
    'a picture twice the size holds the same paint in every zone: %s', (_name, coat, masks) => {
      const zoneMeans = (width: number) => {
        const view = seen(minnow, width)
        const x = lay(view, minnow, coat, masks)
        return [[0, 0.235], [0.235, 0.5]].map(([from = 0, to = 1]) => {
          let [sum, weight] = [0, 0]
          for (let i = 0; i < view.count; i++) {
            const v = view.v[i] ?? 0
            if (view.part[i] !== PART_BODY || v < from || v >= to || (view.u[i] ?? 0) < 0.3) continue
            sum += (view.coverage[i] ?? 0) * (x[i] ?? 0)
            weight += view.coverage[i] ?? 0
          }
          return sum / weight
        })
      }
      const [small, large] = [zoneMeans(480), zoneMeans(960)]
      small.forEach((value, zone) => expect(Math.abs(value / (large[zone] ?? 0) - 1)).toBeLessThan(0.01))
    },
  )

  it('droplets neither add paint nor take any', () => {
    const places = Array.from({ length: 4000 }, (_, i) => [0.3 + 0.0001 * i, 0.4 + (0.00037 * i) % 0.1] as const)
    const samples = samplesAt(minnow, places)
    const dry = samplesAt(minnow, places, 1e-6)
    const coat = coatOf({ gun: { aim: 'from', angle: 80, footprint: 1 } })
    const [wet, smooth] = [lay(samples, minnow, coat), lay(dry, minnow, coat)]
    const difference = mean(wet.map((x, i) => x - (smooth[i] ?? 0)))
    expect(Math.abs(difference)).toBeLessThan(0.006)
    expect(Math.max(...wet.map((x, i) => Math.abs(x - (smooth[i] ?? 0))))).toBeGreaterThan(0.03)
  })

  it('nothing settles under a shield, not even mist', () => {
    const shield = maskOf({ kind: 'tape', does: 'shields', soft: 0.05, outlines: [[[0.35, 0.2], [0.7, 0.2], [0.7, 0.8], [0.35, 0.8]]] })
    const view = seen(minnow, 320)
    const x = lay(view, minnow, coatOf(), [shield])
    let covered = 0
    for (let i = 0; i < view.count; i++) {
      const [u, v] = [view.u[i] ?? 0, view.v[i] ?? 0]
      if (u > 0.36 && u < 0.69 && v > 0.23 && v < 0.77) {
        covered++
        expect(x[i]).toBe(0)
      }
    }
    expect(covered).toBeGreaterThan(1000)
  })

  it('mist drifts a little beyond a coat; a brush leaves none', () => {
    const belly = samplesAt(minnow, [[0.5, 0.75]], 1e-6)
    const sprayed = coatOf({ gun: { aim: 'from', angle: 22, footprint: 0.75 }, where: { zones: ['back'], fade: 2 } })
    expect(lay(belly, minnow, sprayed)[0]).toBeGreaterThan(0)
    expect(lay(belly, minnow, sprayed)[0]).toBeLessThan(0.02)
    expect(lay(belly, minnow, { ...sprayed, tool: { kind: 'brush' } })[0]).toBe(0)
  })

  it('goes on over the ridge of the back without a seam', () => {
    const along = Array.from({ length: 41 }, (_, i) => 0.3 + 0.01 * i)
    const [left, right] = ([1, -1] as const).map(side => lay(samplesAt(minnow, along.map(u => [u, 0.001, side] as const), 1e-6), minnow, back))
    const steps = along.map((_, i) => Math.abs((left?.[i] ?? 0) / (right?.[i] ?? 1) - 1)).sort((a, b) => a - b)
    // A stray drop may stand on one side only.
    expect(steps[30]).toBeLessThan(0.01)
  })

  it('maps tell the deposit to a step of their code', () => {
    const keep = depositKeep(seen(minnow, 160), minnow)
    const map = depositMap(keep, { coat: back, masks: [] })
    const x = layCoat(keep, { coat: back, masks: [] })
    expect(map.peak).toBeCloseTo(Math.max(...x), 6)
    x.forEach((one, i) => expect(Math.abs(Math.sqrt(depositOf(map, i)) - Math.sqrt(one))).toBeLessThan(0.006))
  })

  it('a coat with marks lies on its marks only', () => {
    const dotted = coatOf({ marks: [{ kind: 'dots', dots: [[0.5, 0.5, 2]], soft: 0.1, grow: 0 }] })
    const [on = 0, off = 1] = lay(samplesAt(minnow, [[0.5, 0.5], [0.6, 0.5]]), minnow, dotted)
    expect(on).toBeGreaterThan(0.8)
    expect(off).toBe(0)
  })
})

describe('paint on fins', () => {
  const view = seen(shad, 320)
  const onFin = (name: string) => {
    const part = PART_FIN + shad.shape.fins.findIndex(fin => fin.id === name)
    return Array.from({ length: view.count }, (_, i) => i).filter(i => view.part[i] === part)
  }

  it('lies on the fins it names and nowhere else', () => {
    const x = lay(view, shad, coatOf({ where: { body: false, fins: [{ fin: 'tail', root: 1, tip: 1, on: 'whole' }] } }))
    expect(mean(onFin('tail').map(i => x[i] ?? 0))).toBeCloseTo(1, 1)
    const tail = new Set(onFin('tail'))
    x.forEach((one, i) => {
      if (!tail.has(i)) expect(one).toBe(0)
    })
  })

  it('runs from root to tip', () => {
    const x = lay(view, shad, coatOf({ where: { body: false, fins: [{ fin: 'all', root: 0, tip: 1, on: 'whole' }] } }))
    const part = (from: number, to: number) => mean(onFin('dorsal').filter(i => (view.rootToTip[i] ?? 0) >= from && (view.rootToTip[i] ?? 0) < to).map(i => x[i] ?? 0))
    expect(part(0, 0.2)).toBeLessThan(0.2)
    expect(part(0.8, 1)).toBeGreaterThan(0.8)
  })

  it('a leading edge is the front of the fin, as wide as it says', () => {
    const x = lay(view, shad, coatOf({ where: { body: false, fins: [{ fin: 'anal', root: 1, tip: 1, on: 'leading edge', width: 1.5 }] } }))
    const painted = onFin('anal').filter(i => (x[i] ?? 0) > 0.5)
    const bare = onFin('anal').filter(i => (x[i] ?? 0) <= 0.5)
    expect(painted.length).toBeGreaterThan(20)
    painted.forEach(i => expect(view.rim[i]).toBeLessThan(1.75))
    expect(mean(painted.map(i => view.U[i] ?? 0))).toBeLessThan(mean(bare.map(i => view.U[i] ?? 0)))
  })

  it('rays and spots cover part of a fin', () => {
    for (const on of ['rays', 'spots', 'rim'] as const) {
      const x = lay(view, shad, coatOf({ where: { body: false, fins: [{ fin: 'tail', root: 1, tip: 1, on }] } }))
      const cover = mean(onFin('tail').map(i => x[i] ?? 0))
      expect(cover).toBeGreaterThan(0.05)
      expect(cover).toBeLessThan(0.6)
    }
  })
})
