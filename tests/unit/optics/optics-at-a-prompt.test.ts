import { spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { expect, it } from 'vitest'
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
it.each([
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
