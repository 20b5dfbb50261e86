import { describe, expect, it } from 'vitest'
import { fitView, subpixelSamples, viewSamples } from '#shared/blank/view-samples'
import { depositKeep, depositMap, depositOf } from '#shared/picture/deposit-map'
import { pictureBench } from '#shared/picture/picture-bench'
import { coatOf, maskOf, minnow, shad } from './deposit/bench'

/** 16 places of a pixel in each direction. */
const FINE = 16
const TRUTH = Float32Array.from(Array.from({ length: FINE * FINE }, (_, k) => [(k % FINE + 0.5) / FINE, (Math.floor(k / FINE) + 0.5) / FINE]).flat())

describe('the outline', () => {
  it.each([['minnow', minnow, 0], ['shad', shad, 0], ['shad rolled', shad, 40], ['shad turned over', shad, 180]] as const)('covers its pixels as 256 samples in each say, round nose and tail too: %s', (_, blank, roll) => {
    const view = fitView(blank, { width: 400, height: 200, roll })
    const samples = viewSamples(blank, view)
    const cover = new Float32Array(400 * 200)
    for (let i = 0; i < samples.count; i++) cover[samples.pixel[i]!]! += samples.coverage[i]!
    // Every pixel on an edge, and its neighbours.
    const edge = new Set<number>()
    cover.forEach((share, pixel) => {
      if (share > 0 && share < 1) for (const by of [-401, -400, -399, -1, 0, 1, 399, 400, 401]) edge.add(pixel + by)
    })
    const pixels = Uint32Array.from([...edge].filter((_, k) => k % 7 === 0))
    const truth = subpixelSamples(blank, view, pixels, TRUTH)
    const off = [...pixels].map((pixel, i) => {
      let hits = 0
      for (let k = 0; k < FINE * FINE; k++) hits += truth.coverage[i * FINE * FINE + k]!
      return Math.abs(cover[pixel]! - hits / FINE ** 2)
    }).sort((a, b) => a - b)
    expect(off.length).toBeGreaterThan(150)
    expect(off.reduce((a, b) => a + b, 0) / off.length).toBeLessThan(0.02)
    expect(off[Math.floor(0.99 * off.length)]).toBeLessThan(0.2)
  })
})
