import { readdirSync, readFileSync } from 'node:fs'
import { expect, it } from 'vitest'
import { opticsPlots } from '../../../scripts/lib/optics-plots'

const plots = opticsPlots()

it.each(Object.keys(plots))('the docs show %s as the code draws it today: node scripts/plots.mjs', (name) => {
  expect(readFileSync(`docs/pictures/${name}`, 'utf8')).toBe(plots[name])
})
it('the docs show no plot that the code does not draw', () => {
  const shown = readdirSync('docs/pictures').filter(name => name.startsWith('optics-') && name.endsWith('.svg'))
  expect(shown.sort()).toEqual(Object.keys(plots).sort())
})
it('no plot names a colour of its own but in patches: what is written and drawn is grey', () => {
  for (const text of Object.values(plots)) {
    const style = /<style>(.*)<\/style>/.exec(text)![1]!
    for (const [, r, g, b] of style.matchAll(/#(..)(..)(..)/g)) expect(r === g && g === b).toBe(true)
    expect(text).toContain('prefers-color-scheme:dark')
    expect(text).toMatch(/role="img" aria-label="[^"]{10,}"/)
  }
})
