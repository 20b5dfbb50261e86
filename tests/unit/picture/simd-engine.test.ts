import { setFlagsFromString } from 'node:v8'
import { runInNewContext } from 'node:vm'
import { describe, expect, it } from 'vitest'
import { coatLayer } from '#shared/optics/coat-layer'
import { layOver } from '#shared/optics/film'
import { seenLight } from '#shared/optics/seen-light'
import { coatTable } from '#shared/picture/coat-table'
import type { LightAsk, PictureEngine } from '#shared/picture/engine/picture-engine'
import { plainEngine } from '#shared/picture/engine/plain-engine'
import { simdEngine } from '#shared/picture/engine/simd-engine'
import { paintLight } from '#shared/picture/paint-light'
import type { KeyedCoat, ViewKit } from '#shared/picture/view-kit'
import { differenceOf, joined } from '../../browser-checks/agreement/compare-light'
import { doubleLight } from '../../browser-checks/agreement/double-light'
import { draws } from '../../browser-checks/agreement/draws'
import { randomStacks, type Asked } from '../../browser-checks/agreement/random-stacks'
import { coats } from './patch'

const ASKS = [...randomStacks()]
const simd = (): PictureEngine => simdEngine()!
const apart = (a: Float32Array, b: Float32Array) => Math.max(...a.map((value, i) => Math.abs(value - b[i]!)))
const freshKit = ({ kit }: Asked): ViewKit => ({ ...kit })

describe('the vector engine', { timeout: 60_000 }, () => {
  it('agrees with double precision on random stacks', () => {
    const engine = simd()
    const { samples, most, mean } = joined(ASKS.map(({ kit, ask }) => differenceOf(engine.light(kit, ask), doubleLight(ask))))
    expect(samples).toBeGreaterThanOrEqual(1000)
    expect(most).toBeLessThan(0.5)
    expect(mean).toBeLessThan(0.1)
  })

  it('agrees with the formula of each film at its own thickness, tables and thin mists left aside', () => {
    const PEAK = 3, paints = coats(['White primer', 1], ['Olive green', 1], ['Opaque black', 1], ['Candy red', 1], ['Smoke', 1], ['Silver pearl', 1])
    const tables = paints.map(({ optics }) => coatTable(optics, PEAK))
    const draw = draws(7)
    const all = ASKS.map(({ kit, ask }) => {
      const places = Array.from({ length: 6 }, () => draw.whole(0, paints.length - 1))
      const laid = places.map((paint, c): KeyedCoat => {
        const { flake: _, ...film } = tables[paint]!
        return { key: `${c}`, table: film, codes: Uint8Array.from({ length: ask.form.samples.count }, () => draw.whole(0, 255)) }
      })
      const light = simd().light(kit, { ...ask, coats: laid })
      const reflectance = new Float32Array(16 * ask.form.samples.count)
      for (let i = 0; i < ask.form.samples.count; i++) {
        const running = Float64Array.from(ask.ground)
        places.forEach((paint, c) => layOver(coatLayer(paints[paint]!.optics, PEAK * (laid[c]!.codes[i]! / 255) ** 2, 'picture16'), running, running))
        reflectance.set(running, 16 * i)
      }
      return differenceOf(light, paintLight(ask.form, { reflectance, coats: [] }, ask.lighting))
    })
    const { samples, most, mean } = joined(all)
    expect(samples).toBeGreaterThanOrEqual(1000)
    expect(most).toBeLessThan(0.5)
    expect(mean).toBeLessThan(0.1)
  })

  it('paints a coat that changes, comes or goes as it would paint all afresh', () => {
    for (const { kit, ask } of ASKS.slice(0, 12)) {
      const kept = simd()
      const other = ASKS[40]!.ask.coats
      let now: readonly KeyedCoat[] = ask.coats
      const edits: ((coats: readonly KeyedCoat[]) => KeyedCoat[])[] = [
        list => [...list],
        list => [...list.slice(0, -1), { ...other[0]!, key: 'last' }],
        list => [{ ...other[1]!, key: 'first' }, ...list],
        list => list.slice(0, Math.ceil(list.length / 2)),
        list => [...list, ...other.slice(0, 3).map(coat => ({ ...coat, key: `over ${coat.key}` }))],
      ]
      for (const edit of edits) {
        now = edit(now)
        expect(apart(kept.light(kit, { ...ask, coats: now }), simd().light(freshKit({ kit, ask }), { ...ask, coats: now }))).toBeLessThan(1e-4)
      }
    }
  })

  it('joins coats that lie evenly without a change', () => {
    for (const { kit, ask } of ASKS.slice(0, 24)) {
      const even = ask.coats.map((coat, c): KeyedCoat => c % 3 === 1 ? coat : { ...coat, codes: new Uint8Array(coat.codes.length).fill(40 + 9 * c) })
      const asked: LightAsk = { ...ask, coats: even }
      expect(differenceOf(simd().light(freshKit({ kit, ask }), asked), doubleLight(asked)).most).toBeLessThan(0.05)
    }
  })

  it('holds sixty thick whites over one another', () => {
    const { kit, ask } = ASKS[0]!
    const [white] = coats(['Opaque white', 1])
    const table = coatTable(white!.optics, 30)
    const thick = Array.from({ length: 60 }, (_, c): KeyedCoat => ({ key: `${c}`, table, codes: Uint8Array.from({ length: 32 }, (_, i) => 200 + i) }))
    const asked = { ...ask, coats: thick }
    expect(differenceOf(simd().light(freshKit({ kit, ask }), asked), doubleLight(asked)).most).toBeLessThan(0.1)
  })

  it('sees under water and by any lamp what the plain engine sees', () => {
    for (const wish of [{ light: 'A' }, { light: { kelvin: 4200 } }, { light: 'D65', water: { type: '5C', depth: 5, distance: 2, adapted: true } }] as const) {
      const seen = seenLight(wish)
      const { most } = joined(ASKS.slice(0, 16).map(({ kit, ask }) => {
        const asked: LightAsk = { ...ask, lighting: { ...ask.lighting, seen } }
        return differenceOf(simd().light(freshKit({ kit, ask }), asked), plainEngine().light(freshKit({ kit, ask }), asked))
      }))
      expect(most).toBeLessThan(0.05)
    }
  })

  it('lets go of the memory of a view that nobody looks at any more', async () => {
    setFlagsFromString('--expose-gc')
    const collect = runInNewContext('gc') as () => void
    const engine = simd()
    const { ask } = ASKS[0]!
    let left = 0
    const gone = new FinalizationRegistry<string>(() => left--)
    const memories = WebAssembly.Memory
    const noted = class extends memories {
      constructor(...made: ConstructorParameters<typeof memories>) {
        super(...made)
        left++
        gone.register(this, '')
      }
    }
    WebAssembly.Memory = noted
    try {
      for (let view = 0; view < 20; view++) engine.light(freshKit(ASKS[0]!), ask)
    }
    finally {
      WebAssembly.Memory = memories
    }
    expect(left).toBe(20)
    for (let round = 0; round < 20 && left > 1; round++) {
      collect()
      await new Promise(resolve => setTimeout(resolve, 5))
    }
    expect(left).toBeLessThanOrEqual(1)
    expect(engine.light(freshKit(ASKS[0]!), ask).length).toBe(3 * ask.form.samples.count)
  })
})
