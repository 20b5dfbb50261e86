import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'

const root = fileURLToPath(new URL('../../../', import.meta.url))
const sources = readdirSync(`${root}app`, { recursive: true, encoding: 'utf8' })
  .filter(path => /\.(?:vue|ts|css)$/.test(path))
  .map(path => ({ path: `app/${path}`, text: readFileSync(`${root}app/${path}`, 'utf8') }))
const templates = sources.filter(source => source.path.endsWith('.vue'))

/** Files that may name a colour, and why. */
const MAY_NAME_A_COLOUR = ['app/assets/css/tokens.css']

const without = (text: string) => text.replace(/\/\*[\s\S]*?\*\//g, '').replace(/^\s*\/\/.*$/gm, '').replace(/&#\w+;|href="#[\w-]*"/g, '')
const linesThat = (pattern: RegExp, among: typeof sources) => among.flatMap(({ path, text }) =>
  without(text).split('\n').filter(line => pattern.test(line)).map(line => `${path}: ${line.trim().slice(0, 100)}`))

describe('the look', () => {
  it('has one file that names colours', () => {
    const named = /#(?:[\da-f]{3,4}|[\da-f]{6}|[\da-f]{8})\b(?!-)|\b(?:rgba?|hsla?|oklch|oklab|lab|lch|hwb)\(\s*[\d.]|\b(?:bg|text|border|fill|stroke|from|to|via|ring|outline)-(?:white|black|(?:slate|gray|zinc|neutral|stone|red|orange|amber|yellow|lime|green|emerald|teal|cyan|sky|blue|indigo|violet|purple|fuchsia|pink|rose)-\d{2,3})\b/i
    expect(linesThat(named, sources.filter(source => !MAY_NAME_A_COLOUR.includes(source.path)))).toEqual([])
  })

  it('writes no style into a page, which the content policy would refuse', () => {
    expect(linesThat(/(?:^|\s)style="/, templates)).toEqual([])
    expect(linesThat(/\sv-show=/, templates)).toEqual([])
    expect(linesThat(/\sv-html=/, templates)).toEqual([])
  })

  it('keeps lilac for next alone', () => {
    const users = sources.filter(({ text }) => /\b(?:bg|text|border|fill|stroke)-next\b|var\(--next\)/.test(without(text))).map(source => source.path)
    expect(users.filter(path => !['app/assets/css/tokens.css', 'app/assets/css/tailwind.css'].includes(path))).toEqual([])
  })
})

describe('the drawing sheet', () => {
  /** Parts that others are made of, and that are seen wherever those are. */
  const WITHIN_OTHERS = new Set(['UiReason', 'UiFieldShell'])
  const sheet = templates.filter(({ path }) => path.startsWith('app/components/dev/') || path === 'app/pages/dev/kit.vue').map(source => source.text).join('\n')
  const parts = templates.flatMap(({ path }) => /^app\/components\/ui\/(\w+)\.vue$/.exec(path)?.[1] ?? []).map(name => `Ui${name}`)

  it.each(parts.filter(part => !WITHIN_OTHERS.has(part)))('shows %s', (part) => {
    expect(sheet).toMatch(new RegExp(`<${part}\\b`))
  })

  it('is left out of what is built', () => {
    expect(existsSync(`${root}app/pages/dev/kit.vue`)).toBe(true)
    expect(readFileSync(`${root}nuxt.config.ts`, 'utf8')).toMatch(/\$production: \{ ignore: \[[^\]]*pages\/dev\/\*\*/)
  })
})
