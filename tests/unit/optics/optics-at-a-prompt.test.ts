import { spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { expect, it } from 'vitest'
import { BANDS_36 } from '../../../shared/optics/bands'
import { answer } from '../../../scripts/optics-cli'

const flat = (value: number) => new Array<number>(36).fill(value)
const ask = (question: object) => answer(JSON.stringify(question))
const run = (question: string) => spawnSync(process.execPath, [fileURLToPath(new URL('../../../scripts/optics.mjs', import.meta.url))], { input: question, encoding: 'utf8' })

it('answers on standard output and nowhere else', () => {
  const { status, stdout, stderr } = run('{"op":"layer","cases":[[0,3,1,0],[0,0,0,0.4]]}')
  expect([status, stderr]).toEqual([0, ''])
  expect(JSON.parse(stdout)).toEqual({ R: [0.75, 0], T: [0.25, 1], over: [0.75, 0.4] })
})
it('refuses in one line on standard error and answers nothing', () => {
  const { status, stdout, stderr } = run('{"op":"layer","cases":')
  expect(status).not.toBe(0)
  expect(stdout).toBe('')
  expect(stderr.trimEnd().split('\n')).toHaveLength(1)
  expect(stderr).toContain('not JSON')
})
it('gets back a colour from the spectrum it found for it', () => {
  const { reflectance } = ask({ op: 'spectrum', lab: [52, 30, -20], light: 'D65' }) as { reflectance: number[] }
  const { lab } = ask({ op: 'colour', reflectance, light: 'D65' }) as { lab: number[] }
  expect(lab).toEqual([52, 30, -20].map(value => expect.closeTo(value, 8)))
})
it('shows a perfect white as 1, 1, 1 and a stack without coats as its ground', () => {
  expect(ask({ op: 'colour', reflectance: flat(1), light: 'A' })).toMatchObject({ lab: [100, 0, 0].map(value => expect.closeTo(value, 9)), srgb: [1, 1, 1].map(value => expect.closeTo(value, 6)) })
  const { reflectance } = ask({ op: 'stack', ground: flat(0.5), coats: [], finish: 'matt', light: 'D65' }) as { reflectance: number[] }
  expect(reflectance[0]).toBeCloseTo(0.04 + 0.96 * 0.4 * 0.5 / 0.7, 14)
})
it('finds K and S from two grounds', () => {
  const { K, S, clipped } = ask({ op: 'twoGrounds', black: flat(0), white: flat(0.8), overBlack: flat(0.75), overWhite: flat(0.75 + 0.0625 * 0.8 / 0.4), passes: 2 }) as { K: number[], S: number[], clipped: boolean }
  expect([K[0], S[0], clipped]).toEqual([expect.closeTo(0, 9), expect.closeTo(1.5, 9), false])
})
it('shows a pearl by angle, bright towards the gloss and its other hue away from it', () => {
  const { lab } = ask({ op: 'pearl', thickness: 118, oxide: 'anatase', meanFlakes: 1, sigma: 9, edge: 0.06, ground: flat(0.02), aspecular: [15, 25, 45, 75, 110] }) as { lab: [number, number, number][] }
  expect(lab).toHaveLength(5)
  expect(lab[0]![0]).toBeGreaterThan(lab[4]![0] + 10)
  expect(lab[1]![2]).toBeLessThan(-20)
})
it('adds what a fluorescent gives off to what it sends back', () => {
  const question = { op: 'fluorescent', Kf: BANDS_36.map(nm => nm < 560 ? 0.6 : 0), Ko: flat(0), S: flat(0.02), emission: BANDS_36.map(nm => Math.exp(-(((nm - 600) / 34) ** 2))), passes: 2, ground: flat(0.95), light: 'D65' }
  const lit = ask({ ...question, yield: 0.9 }) as { reflected: number[], luminescent: number[], lab: [number, number, number] }
  const dull = ask({ ...question, yield: 0 }) as typeof lit
  expect(dull.luminescent).toEqual(flat(0))
  expect(dull.reflected).toEqual(lit.reflected)
  const { lab } = ask({ op: 'colour', reflectance: lit.reflected.map((value, i) => value + lit.luminescent[i]!), light: 'D65' }) as { lab: number[] }
  expect(lit.lab).toEqual(lab.map(value => expect.closeTo(value, 9)))
  expect(lit.lab[0] - dull.lab[0]).toBeGreaterThan(10)
})
it('takes a colour under water', () => {
  const { lab, labAdapted, light } = ask({ op: 'water', water: '5C', depth: 3, distance: 1, reflectance: flat(0.8) }) as { lab: number[], labAdapted: number[], light: number[] }
  expect(lab[0]).toBeLessThan(labAdapted[0]!)
  expect(light).toHaveLength(36)
})
it('finds the paint and the passes of a colour', () => {
  const paints = [{ id: 'a', K: flat(0.5), S: flat(0.2) }, { id: 'b', K: BANDS_36.map(nm => nm < 560 ? 1 : 0.02), S: flat(0.4) }]
  const { lab } = ask({ op: 'stack', ground: flat(0.8), coats: [{ ...paints[1], passes: 2 }], finish: 'gloss' }) as { lab: number[] }
  const found = ask({ op: 'find', target: lab, ground: flat(0.8), paints }) as { paints: { parts: object[], passes: number, deltaE: number }[], mixes: object[] }
  expect(found.paints[0]).toMatchObject({ parts: [{ id: 'b', drops: 1 }], passes: expect.closeTo(2, 1) as number })
  expect(found.mixes).toHaveLength(1)
})
it.each([
  ['water nobody knows', { op: 'water', water: 'ink', depth: 1, distance: 1, reflectance: flat(0.5) }, /"water" must be one of/],
  ['an oxide that is none', { op: 'pearl', oxide: 'gold', thickness: 50, meanFlakes: 1, sigma: 9, edge: 0, ground: flat(0.5), aspecular: [15] }, /"oxide"/],
  ['a yield above one', { op: 'fluorescent', Kf: flat(1), Ko: flat(0), S: flat(0), emission: flat(1), yield: 2, passes: 1, ground: flat(0.5) }, /yield/],
  ['a dark lamp', { op: 'fluorescent', Kf: flat(1), Ko: flat(0), S: flat(0), emission: flat(0), yield: 1, passes: 1, ground: flat(0.5) }, /emission/],
  ['an unknown light', { op: 'colour', reflectance: flat(0.5), light: 'moon' }, /light/],
  ['a spectrum of 35 bands', { op: 'colour', reflectance: flat(0.5).slice(1) }, /36 numbers, got 35/],
  ['a value that is no number', { op: 'deltaE', pairs: [[50, 0, 0, 50, 0, null]] }, /finite number/],
  ['an unknown operation', { op: 'paint' }, /"op" must be one of/],
  ['a negative thickness', { op: 'film', cases: [{ wavelength: 550, angle: 0, n0: 1, films: [{ n: 2, k: 0, d: -1 }], nExit: 1.5 }] }, /d must be/],
  ['light along the surface', { op: 'film', cases: [{ wavelength: 550, angle: 90, n0: 1, films: [], nExit: 1.5 }] }, /angle/],
  ['a finish that is none', { op: 'stack', ground: flat(0.5), coats: [], finish: 'shiny' }, /finish/],
  ['negative passes', { op: 'stack', ground: flat(0.5), coats: [{ K: flat(1), S: flat(1), passes: -1 }], finish: 'matt' }, /passes/],
  ['a colour no surface has', { op: 'spectrum', lab: [50, 180, -180] }, /no surface/],
  ['a list instead of a question', [1], /JSON object/],
])('refuses %s', (_, question, reason) => {
  expect(() => ask(question as object)).toThrow(reason as RegExp)
})
