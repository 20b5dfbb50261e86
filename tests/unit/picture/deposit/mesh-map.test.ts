import { describe, expect, it } from 'vitest'
import { depositKeep } from '#shared/picture/deposit/keep'
import { maskMap } from '#shared/picture/deposit/mask-map'
import { besideThread } from '#shared/picture/deposit/mesh-map'
import { cellAt, newCell, weaveOf } from '#shared/picture/deposit/weave'
import { maskOf, mean, minnow, samplesAt, seen, spread } from './bench'

const net = (parts: object = {}, seed = 5) => maskOf({ kind: 'mesh', weave: 'hexagon', pitch: 2, thread: 0.32, ...parts }, seed)

describe('weave', () => {
  it.each(['hexagon', 'square', 'diamond'] as const)('a flat tight %s net lets ((p-w)/p)² through', (weave) => {
    const [pitch, thread, soft] = [2, 0.32, 0.05]
    const cells = weaveOf({ weave, angle: 13, stretch: 1 })
    const cell = newCell()
    let sum = 0
    const count = 700
    for (let i = 0; i < count * count; i++) {
      cellAt(cells, (i % count) * 0.0917, Math.floor(i / count) * 0.0763, cell)
      sum += besideThread(cell.nearest * pitch, thread, soft)
    }
    expect(Math.abs(sum / count ** 2 - ((pitch - thread) / pitch) ** 2)).toBeLessThan(0.005)
  })

  it('a loose net leaks', () => {
    const under = (soft: number) => besideThread(0, 0.32, soft)
    expect(under(0.03)).toBeLessThan(0.001)
    expect(under(0.4)).toBeGreaterThan(0.5)
  })

  it('threads stay as thick when a net is stretched', () => {
    const cells = weaveOf({ weave: 'square', angle: 0, stretch: 2 })
    const cell = newCell()
    // .1 of a stretched cell from an upright thread is .2 pitches of way.
    cellAt(cells, 0.4, 0, cell)
    expect(cell.nearest).toBeCloseTo(0.2, 6)
    cellAt(cells, 0, 0.4, cell)
    expect(cell.nearest).toBeCloseTo(0.1, 6)
  })

  it('a hexagon stands flat side up: its middle is half a pitch from the thread above', () => {
    const cell = newCell()
    cellAt(weaveOf({ weave: 'hexagon', angle: 0, stretch: 1 }), 0, 0.45, cell)
    expect(cell.nearest).toBeCloseTo(0.05, 6)
    expect([cell.x, cell.y]).toEqual([0, 0.45])
  })
})

describe('a net on a body', () => {
  const view = seen(minnow, 320)

  it('the same fitting is the same for every coat, to the last bit', () => {
    const keep = depositKeep(view, minnow)
    expect(maskMap(keep, net())).toBe(maskMap(keep, net()))
    expect(maskMap(depositKeep(view, minnow), net())).toEqual(maskMap(keep, net()))
  })

  it('fitted anew it lies otherwise', () => {
    const keep = depositKeep(view, minnow)
    const [a, b] = [maskMap(keep, net()), maskMap(keep, net({}, 6))]
    const moved = Array.from(keep.onBody).filter(i => Math.abs((a[i] ?? 0) - (b[i] ?? 0)) > 0.2).length
    expect(moved / keep.onBody.length).toBeGreaterThan(0.1)
  })

  it('the two flanks are fitted each on its own', () => {
    const places = Array.from({ length: 400 }, (_, i) => [0.3 + 0.001 * i, 0.45] as const)
    const left = maskMap(depositKeep(samplesAt(minnow, places), minnow), net())
    const right = maskMap(depositKeep(samplesAt(minnow, places.map(([u, v]) => [u, v, -1] as const)), minnow), net())
    expect(left).not.toEqual(right)
    expect(mean(left)).toBeCloseTo(mean(right), 0)
  })

  it('it is tight on the flank and gapes at the belly, where scales dissolve', () => {
    const row = (v: number) => {
      const places = Array.from({ length: 900 }, (_, i) => [0.35 + 0.0003 * i, v] as const)
      return spread(maskMap(depositKeep(samplesAt(minnow, places), minnow), net()))
    }
    expect(row(0.46)).toBeGreaterThan(0.28)
    expect(row(0.97)).toBeLessThan(0.5 * row(0.46))
  })

  it('cells shrink toward the tail as the net follows the body', () => {
    const threads = (from: number) => {
      const places = Array.from({ length: 3000 }, (_, i) => [from + 0.00005 * i, 0.5] as const)
      const map = maskMap(depositKeep(samplesAt(minnow, places), minnow), net({ follow: 1, weave: 'square' }))
      let count = 0
      for (let i = 1; i < map.length; i++) if ((map[i - 1] ?? 0) >= 0.4 && (map[i] ?? 0) < 0.4) count++
      return count
    }
    expect(threads(0.75)).toBeGreaterThan(threads(0.3))
  })
})
