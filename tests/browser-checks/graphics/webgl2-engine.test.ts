import { describe, expect, it } from 'vitest'
import { demoOptics, ember, perch } from '../../fixtures/demo-looks'
import { differenceOf, joined } from '../agreement/compare-light'
import { doubleLight } from '../agreement/double-light'
import { randomStacks, type Asked } from '../agreement/random-stacks'
import { graphicsCounts } from './graphics-counts'
import { sparedEngine } from '~/workers/webgl2/spared-engine'
import { webgl2Engine, type Webgl2Engine } from '~/workers/webgl2/webgl2-engine'
import { seenLight } from '#shared/optics/seen-light'
import { coatTable } from '#shared/picture/coat-table'
import { plainEngine } from '#shared/picture/engine/plain-engine'
import type { Look } from '#shared/picture/look'
import { pictureBench } from '#shared/picture/picture-bench'

/** Bytes: room for three views of one row of samples each, and not for four. */
const THREE_VIEWS = 3.5 * 2048 * 96
const WISH = { width: 480, height: 240, quality: 'coarse' } as const

function pageCanvas(): { canvas: HTMLCanvasElement, gl: WebGL2RenderingContext } {
  const canvas = document.createElement('canvas')
  return { canvas, gl: canvas.getContext('webgl2')! }
}

function engineOn(canvas: HTMLCanvasElement, viewsBytes?: number): Webgl2Engine {
  const engine = webgl2Engine(canvas, viewsBytes)
  if (!engine) throw new Error('this browser has no WebGL 2 that draws into 32-bit numbers')
  return engine
}

function heard(canvas: HTMLCanvasElement, event: string): Promise<unknown> {
  return new Promise(resolve => canvas.addEventListener(event, resolve, { once: true }))
}

/** Until all who listen have heard. */
function breath(ms = 0): Promise<void> {
  return new Promise(resolve => setTimeout(resolve, ms))
}

/** Perch with one pass more of its coat in the middle. */
function onePassMore(look: Look): Look {
  const coats = look.body.stack.filter(item => item.act === 'coat')
  const middle = coats[Math.floor(coats.length / 2)]!
  const stack = look.body.stack.map(item => item === middle && item.act === 'coat' ? { ...item, coat: { ...item.coat, passes: item.coat.passes + 1 } } : item)
  return { ...look, body: { ...look.body, stack } }
}

/** Greatest step between two pictures, of 255. */
function apart(a: Uint8ClampedArray, b: Uint8ClampedArray): number {
  return a.reduce((most, value, i) => Math.max(most, Math.abs(value - b[i]!)), 0)
}

describe('on a canvas of a page', () => {
  it('agrees with double precision', () => {
    const engine = engineOn(pageCanvas().canvas)
    const difference = joined([...randomStacks()].map(({ kit, ask }) => differenceOf(engine.light(kit, ask), doubleLight(ask))))
    engine.close()
    expect(difference.samples).toBeGreaterThan(1000)
    expect(difference.most).toBeLessThan(0.5)
    expect(difference.mean).toBeLessThan(0.1)
  })
  it('holds sixty thick whites over one another', () => {
    const { kit, ask } = randomStacks().next().value as Asked
    const table = coatTable(demoOptics('Opaque white'), 30)
    const coats = Array.from({ length: 60 }, (_, c) => ({ key: `${c}`, table, codes: Uint8Array.from({ length: 32 }, (_, i) => 200 + i) }))
    const asked = { ...ask, coats }
    const engine = engineOn(pageCanvas().canvas)
    expect(differenceOf(engine.light(kit, asked), doubleLight(asked)).most).toBeLessThan(0.1)
    engine.close()
  })
  it('sees what is seen under water and by any lamp', () => {
    const engine = engineOn(pageCanvas().canvas)
    const asks = [...randomStacks()].slice(0, 12)
    for (const wish of [{ light: 'A' }, { light: { kelvin: 4200 } }, { light: 'D65', water: { type: '5C', depth: 5, distance: 2, adapted: true } }] as const) {
      const seen = seenLight(wish)
      const all = asks.map(({ kit, ask }) => {
        const asked = { ...ask, lighting: { ...ask.lighting, seen } }
        return differenceOf(engine.light(kit, asked), doubleLight(asked))
      })
      expect(joined(all).most).toBeLessThan(0.5)
    }
    engine.close()
  })
  it('paints an edit as it would paint all afresh', () => {
    const engine = engineOn(pageCanvas().canvas), fresh = engineOn(pageCanvas().canvas)
    const [edited, other] = [pictureBench('edits', engine), pictureBench('edits', fresh)]
    for (const look of [perch, onePassMore(perch), ember, perch]) edited.draw(look, WISH)
    expect(apart(edited.draw(onePassMore(ember), WISH).rgba, other.draw(onePassMore(ember), WISH).rgba)).toBe(0)
    engine.close()
    fresh.close()
  })
  it('leaves more glowing coats than it has room for to the next engine', () => {
    const { kit, ask } = randomStacks().next().value as Asked
    const table = coatTable(demoOptics('Fluorescent orange'), 1)
    const coats = Array.from({ length: 9 }, (_, c) => ({ key: `${c}`, table, codes: new Uint8Array(32).fill(60 + c) }))
    const engine = sparedEngine(engineOn(pageCanvas().canvas), plainEngine())
    expect(differenceOf(engine.light(kit, { ...ask, coats }), doubleLight({ ...ask, coats })).most).toBeLessThan(0.01)
    expect(engine.name).toBe('webgl2')
    engine.close()
  })
  it('is not offered where nothing can be drawn into 32-bit numbers', () => {
    const { canvas, gl } = pageCanvas()
    const getExtension = gl.getExtension.bind(gl) as (name: string) => unknown
    gl.getExtension = ((name: string) => name === 'EXT_color_buffer_float' ? null : getExtension(name)) as typeof gl.getExtension
    expect(webgl2Engine(canvas)).toBeUndefined()
  })
})

describe('what it hands over', () => {
  it('is nothing for the same picture again, and one table for one pass more', () => {
    const { canvas, gl } = pageCanvas()
    const { uploads } = graphicsCounts(gl)
    const engine = engineOn(canvas)
    const bench = pictureBench('edits', engine)
    const draw = (look: Look) => void bench.draw(look, WISH)
    draw(perch)
    expect(uploads()).toBeGreaterThan(10)
    draw(perch)
    expect(uploads()).toBe(0)
    draw(onePassMore(perch))
    // R, T² - R², what a ray keeps, and T.
    expect(uploads()).toBe(4)
    engine.close()
  })
  it('is let go of with the views drawn longest ago, and all of it in the end', () => {
    const { canvas, gl } = pageCanvas()
    const { textures } = graphicsCounts(gl)
    const engine = engineOn(canvas, THREE_VIEWS)
    const bench = pictureBench('orders', engine)
    const counts = Array.from({ length: 8 }, (_, turn) => {
      bench.draw(perch, { width: 120, height: 60, roll: 45 * turn, quality: 'coarse' })
      return textures()
    })
    expect(counts[7]).toBe(counts[4])
    expect(counts[4]).toBeGreaterThan(counts[0]!)
    engine.close()
    expect(textures()).toBe(0)
  })
})

describe('a view that nobody holds any more', () => {
  it('is let go of on the graphics processor too', async () => {
    const { canvas, gl } = pageCanvas()
    const { textures } = graphicsCounts(gl)
    const engine = engineOn(canvas)
    const drawn = (turn: number) => void pictureBench('orders', engine).draw(perch, { width: 120, height: 60, roll: 30 * turn, quality: 'coarse' })
    drawn(0)
    const one = textures()
    for (let turn = 1; turn <= 6; turn++) drawn(turn)
    const seven = textures()
    // Whoever drives this page collects what nobody holds as long as it is called so.
    const { title } = document
    document.title = 'collect'
    for (let wait = 0; wait < 100 && textures() > one; wait++) await breath(100)
    document.title = title
    expect(seven).toBeGreaterThan(one)
    expect(textures()).toBeLessThanOrEqual(one)
    engine.close()
  })
})

describe('when the machine takes the graphics processor away', () => {
  it('the next engine paints, and when it comes back it paints again', async () => {
    const { canvas, gl } = pageCanvas()
    const taken = gl.getExtension('WEBGL_lose_context')!
    const engine = sparedEngine(engineOn(canvas), plainEngine())
    const [bench, plain] = [pictureBench('edits', engine), pictureBench()]
    const edited = onePassMore(perch)

    expect(apart(bench.draw(perch, WISH).rgba, plain.draw(perch, WISH).rgba)).toBeLessThanOrEqual(1)
    expect(engine.name).toBe('webgl2')

    const lost = heard(canvas, 'webglcontextlost')
    taken.loseContext()
    // At once, before the page has heard of it.
    expect(apart(bench.draw(edited, WISH).rgba, plain.draw(edited, WISH).rgba)).toBe(0)
    await lost
    await breath()
    expect(apart(bench.draw(perch, WISH).rgba, plain.draw(perch, WISH).rgba)).toBe(0)
    expect(engine.name).toBe('plain')

    const back = heard(canvas, 'webglcontextrestored')
    taken.restoreContext()
    await back
    expect(apart(bench.draw(edited, WISH).rgba, plain.draw(edited, WISH).rgba)).toBeLessThanOrEqual(1)
    expect(engine.name).toBe('webgl2')
    engine.close()
  })
})
