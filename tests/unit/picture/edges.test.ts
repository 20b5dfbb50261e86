import { describe, expect, it } from 'vitest'
import { fitView, subpixelSamples, viewSamples } from '#shared/blank/view-samples'
import { labFromXyz } from '#shared/optics/colorimetry'
import { decodeChannel, xyzFromLinearRgb } from '#shared/optics/screen-colour'
import { pictureBench } from '#shared/picture/picture-bench'
import type { Picture } from '#shared/picture/picture-options'
import { under } from '#server/seed/write-scheme'
import { minnow, shad } from './deposit/bench'
import { brushed, sprayed } from './sprayed'

/** 16 places of a pixel in each direction. */
const FINE = 16
const TRUTH = Float32Array.from(Array.from({ length: FINE * FINE }, (_, k) => [(k % FINE + 0.5) / FINE, (Math.floor(k / FINE) + 0.5) / FINE]).flat())
const TIMEOUT = { timeout: 60_000 }
const bench = pictureBench()
const mean = (values: readonly number[]) => values.reduce((a, b) => a + b, 0) / values.length
const linear = ({ rgba }: Picture, pixel: number) => [0, 1, 2].map(c => decodeChannel(rgba[4 * pixel + c]! / 255)) as [number, number, number] // three by the list

describe('the outline', TIMEOUT, () => {
  it.each([['minnow', minnow, 0], ['shad', shad, 0], ['shad rolled', shad, 40], ['shad turned over', shad, 180]] as const)('covers its pixels as 256 samples in each say, round nose and tail too: %s', (_, blank, roll) => {
    const view = fitView(blank, { width: 400, height: 200, roll })
    const samples = viewSamples(blank, view)
    const cover = new Float32Array(400 * 200)
    for (let i = 0; i < samples.count; i++) cover[samples.pixel[i]!]! += samples.coverage[i]!
    const edge = new Set<number>()
    cover.forEach((share, pixel) => {
      if (share > 0 && share < 1) for (const by of [-401, -400, -399, -1, 0, 1, 399, 400, 401]) edge.add(pixel + by)
    })
    const pixels = Uint32Array.from([...edge].filter((_, k) => k % 9 === 0))
    const truth = subpixelSamples(blank, view, pixels, TRUTH)
    const off = [...pixels].map((pixel, i) => {
      let hits = 0
      for (let k = 0; k < FINE * FINE; k++) hits += truth.coverage[i * FINE * FINE + k]!
      return Math.abs(cover[pixel]! - hits / FINE ** 2)
    }).sort((a, b) => a - b)
    expect(off.length).toBeGreaterThan(100)
    expect(mean(off)).toBeLessThan(0.01)
    expect(off[Math.floor(0.99 * off.length)]).toBeLessThan(0.1)
    // Where no fin crosses it, nowhere is a pixel far off.
    if (blank === minnow) expect(off.at(-1)).toBeLessThan(0.2)
  })
})

describe('a hard edge', TIMEOUT, () => {
  it('is as smooth as sixteen pictures of it laid into one', () => {
    const slanted = under('tape', 7, { kind: 'tape', does: 'opens', outlines: [[[0.3, 0.1], [0.5, 0.1], [0.7, 0.9], [0.5, 0.9]]], soft: 0.05, wobble: 0 }, [brushed('Opaque black', 4)])
    const look = sprayed([brushed('Opaque white', 6), ...slanted])
    const seen = { plain: true, quality: 'print', light: 'bench' } as const
    const shown = bench.draw(look, { ...seen, width: 208, height: 36, mmPerPixel: 0.2 })
    const truth = bench.draw(look, { ...seen, width: 832, height: 144, mmPerPixel: 0.05 })
    const off: number[] = []
    let onEdge = 0
    for (let row = 0; row < 36; row++) {
      for (let column = 40; column < 170; column++) {
        let light = 0
        for (let k = 0; k < 16; k++) light += linear(truth, (4 * row + (k >> 2)) * 832 + 4 * column + (k & 3))[1] / 16
        if (light < 0.08 || light > 0.8) continue
        onEdge++
        off.push(Math.abs(light - linear(shown, row * 208 + column)[1]))
      }
    }
    expect(onEdge).toBeGreaterThan(60)
    expect(mean(off)).toBeLessThan(0.06)
    expect(off.sort((a, b) => a - b)[Math.floor(0.95 * off.length)]).toBeLessThan(0.17)
  })
})

describe('a soft fade', TIMEOUT, () => {
  it('has no bands: from row to row it falls by no more than a code, and never rises', () => {
    const fade = brushed('Smoke', 3, { where: { zones: ['back', 'upper flank'], edge: 'fades', fade: 16, reach: 0 } })
    const picture = bench.draw(sprayed([brushed('Opaque white', 6), fade]), { width: 260, height: 420, mmPerPixel: 0.03, plain: true })
    // Dither and grain are averaged out along the body; what is left would show as bands.
    const profile = Array.from({ length: 420 }, (_, row) => mean(Array.from({ length: 60 }, (_, k) => picture.rgba[4 * (row * 260 + 100 + k) + 1]!)))
    const inside = profile.slice(60, 360)
    expect(Math.max(...inside) - Math.min(...inside)).toBeGreaterThan(30)
    const steps = inside.slice(1).map((value, i) => value - inside[i]!)
    expect(Math.max(...steps)).toBeLessThan(1.25)
    expect(Math.min(...steps)).toBeGreaterThan(-0.45)
  })
})

describe('a highlight', TIMEOUT, () => {
  it('leaves a saturated red flank its chroma outside its core', () => {
    const look = sprayed([brushed('Opaque white', 6), brushed('Candy red', 3)])
    const [glossy, plain] = [false, true].map(isPlain => bench.draw(look, { width: 320, height: 160, plain: isPlain, surround: null })) as [Picture, Picture]
    // Form takes lightness and chroma together; white light on top takes chroma from the lightness there is.
    const saturation = (picture: Picture, pixel: number) => {
      const [L, a, b] = labFromXyz(xyzFromLinearRgb(linear(picture, pixel)))
      return Math.hypot(a, b) / L
    }
    const kept: number[] = []
    for (let pixel = 0; pixel < 320 * 160; pixel++) {
      if (glossy.rgba[4 * pixel + 3] === 255 && saturation(plain, pixel) > 1) kept.push(saturation(glossy, pixel) / saturation(plain, pixel))
    }
    expect(kept.length).toBeGreaterThan(5000)
    const share = (least: number) => kept.filter(one => one > least).length / kept.length
    expect(share(0.75)).toBeGreaterThan(0.72)
    expect(share(0.5)).toBeGreaterThan(0.94)
  })
})
