import { describe, expect, it } from 'vitest'
import { labFromXyz, type Lab } from '#shared/optics/colorimetry'
import { deltaE2000 } from '#shared/optics/delta-e'
import { decodeChannel, xyzFromLinearRgb } from '#shared/optics/screen-colour'
import { pictureBench } from '#shared/picture/picture-bench'
import type { Picture } from '#shared/picture/picture-options'
import { renderLook } from '#shared/picture/render'
import { ember, perch } from '../../fixtures/demo-looks'

/** Coarse pictures of 160 by 80: what is asked here does not hang on fine edges. */
const SIZE = { width: 640, height: 320, quality: 'coarse' } as const
const PIXELS = 160 * 80
/** Whole pictures take their time where many tests share two cores. */
const TIMEOUT = { timeout: 30_000 }
const bench = pictureBench()

function meanLab({ rgba }: Picture): Lab {
  const sum = [0, 0, 0]
  let count = 0
  for (let i = 0; i < rgba.length; i += 4) {
    if (rgba[i + 3] !== 255) continue
    count++
    for (let c = 0; c < 3; c++) sum[c]! += decodeChannel(rgba[i + c]! / 255)
  }
  return labFromXyz(xyzFromLinearRgb(sum.map(value => value / count) as [number, number, number]))
}

describe('the surround', TIMEOUT, () => {
  const empty = bench.draw(ember, { ...SIZE, surround: null })
  it.each([0, 119, 146, 255])('is exactly the grey asked for wherever the blank does not reach: %i', (grey) => {
    const picture = bench.draw(ember, { ...SIZE, surround: grey })
    let bare = 0
    for (let i = 0; i < picture.rgba.length; i += 4) {
      if (empty.rgba[i + 3] !== 0) continue
      bare++
      expect([...picture.rgba.subarray(i, i + 4)]).toEqual([grey, grey, grey, 255])
    }
    expect(bare).toBeGreaterThan(0.4 * PIXELS)
  })

  it('stays neutral under a shadow', () => {
    const { rgba } = bench.draw(ember, { ...SIZE, surround: 119, shadow: true })
    let darkest = 255
    for (let i = 0; i < rgba.length; i += 4) {
      if (empty.rgba[i + 3] !== 0) continue
      expect(rgba[i]).toBe(rgba[i + 1])
      expect(rgba[i]).toBe(rgba[i + 2])
      darkest = Math.min(darkest, rgba[i]!)
    }
    expect(darkest).toBeLessThan(115)
  })
})

describe('a picture', TIMEOUT, () => {
  it('is the same whenever the same is asked for', () => {
    expect(renderLook(ember, SIZE).rgba).toEqual(renderLook(ember, SIZE).rgba)
  })

  it('comes coarse first, at a quarter of the size, and hardly changes colour as it is refined', () => {
    const stages = [...bench.stages(perch, { width: 400, height: 200, surround: null })]
    expect(stages.map(({ stage, picture }) => [stage, picture.width])).toEqual([['coarse', 100], ['full', 400], ['refined', 400]])
    const [coarse, , fine] = stages.map(({ picture }) => meanLab(picture))
    expect(deltaE2000(coarse!, fine!)).toBeLessThan(1)
  })

  it('shows the bare ground alone when asked for no coat', () => {
    const ground = meanLab(bench.draw(perch, { ...SIZE, upTo: 'ground', plain: true, clear: false, surround: null }))
    expect(deltaE2000(ground, perch.body.ground.colour)).toBeLessThan(2)
  })

  it('draws an edit on kept coats as it would draw it afresh', () => {
    const kept = pictureBench()
    const edited = structuredClone(perch)
    const item = edited.body.stack.filter(each => each.act === 'coat')[6]
    if (item?.act !== 'coat') throw new Error('the perch has a seventh coat')
    for (const passes of [1, 5, 2]) {
      item.coat.passes = passes
      kept.draw(edited, SIZE)
    }
    const afresh = renderLook(edited, SIZE).rgba
    const again = kept.draw(edited, SIZE).rgba
    expect(Math.max(...afresh.map((value, i) => Math.abs(value - again[i]!)))).toBeLessThanOrEqual(1)
  })

  it('draws what glows as afresh when a coat over it comes, moves, thins and goes', () => {
    const kept = pictureBench()
    const edited = structuredClone(ember)
    const ids = edited.body.stack.flatMap(item => item.act === 'coat' ? [item.coat] : [])
    const daggers = ids.find(coat => coat.name === 'Black daggers')!, orange = ids.find(coat => coat.name.includes('orange'))!
    const same = (wish: object) => {
      const again = kept.draw(edited, { ...SIZE, ...wish }).rgba, afresh = renderLook(edited, { ...SIZE, ...wish }).rgba
      return Math.max(...afresh.map((value, i) => Math.abs(value - again[i]!)))
    }
    expect(same({})).toBeLessThanOrEqual(1)
    daggers.passes = 0.3
    expect(same({})).toBeLessThanOrEqual(1)
    orange.gun = { aim: 'from', angle: 90, footprint: 1 }
    expect(same({})).toBeLessThanOrEqual(1)
    expect(same({ upTo: orange.id })).toBeLessThanOrEqual(1)
    expect(same({ upTo: 'all' })).toBeLessThanOrEqual(1)
  })

  it('is glossy under a clear and not before', () => {
    const brightest = (clear: boolean) => Math.max(...bench.draw(perch, { ...SIZE, clear, surround: 0 }).rgba.filter((_, i) => i % 4 === 1))
    expect(brightest(true)).toBeGreaterThan(brightest(false))
  })

  it('tells what lies where somebody points', () => {
    const options = { width: 320, height: 160, quality: 'coarse' } as const
    const { mmPerPixel, origin } = bench.draw(perch, options)
    const at = (x: number, y: number) => bench.pick(perch, options, 4 * (origin[0] + x / mmPerPixel), 4 * (origin[1] - y / mmPerPixel))
    expect(at(40, 9)).toMatchObject({ along: 'trunk', side: 1 })
    expect(at(40, 11)?.zone).toBe('back')
    expect(at(40, -11)?.zone).toBe('belly')
    expect(at(6, 0)?.along).toBe('head')
    expect(at(86, 5)?.zone).toBe('fin:tail')
    expect(at(-30, 30)).toBeUndefined()
  })
})
