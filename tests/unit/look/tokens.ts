import { readFileSync } from 'node:fs'

/** The four lights a screen is laid for. */
export const LIGHTS = ['light', 'dark', 'bright', 'dim'] as const
export type Light = (typeof LIGHTS)[number]
export type Tokens = Readonly<Record<string, string>>

const css = readFileSync(new URL('../../../app/assets/css/tokens.css', import.meta.url), 'utf8').replace(/\/\*[\s\S]*?\*\//g, '')

/** The colour tokens (`#rrggbb` by name) as one light lays them. */
export function tokensIn(light: Light): Tokens {
  const desk = block(':root')
  const isDark = light === 'dark' || light === 'dim'
  const chosen = Object.fromEntries(Object.entries(desk).map(([name, value]) => {
    const pair = /^light-dark\((#[\da-f]{6}), (#[\da-f]{6})\)$/.exec(value)
    return [name, pair ? pair[isDark ? 2 : 1] ?? '' : value]
  }))
  const bench = light === 'bright' || light === 'dim' ? block(`[data-bench=${light}]`) : {}
  return Object.fromEntries(Object.entries({ ...chosen, ...bench }).filter(([, value]) => /^#[\da-f]{6}$/.test(value)))
}

/** The declarations of the first block under a selector. */
function block(selector: string): Record<string, string> {
  const start = css.indexOf(`${selector} {`)
  const body = css.slice(css.indexOf('{', start) + 1, css.indexOf('}', start))
  return Object.fromEntries([...body.matchAll(/--([\w-]+):\s*([^;]+);/g)].map(found => [found[1] ?? '', (found[2] ?? '').trim()]))
}

/** Red, green and blue of `#rrggbb`, 0 to 255. */
export function rgb(hex: string): readonly [number, number, number] {
  const at = (place: number) => Number.parseInt(hex.slice(place, place + 2), 16)
  return [at(1), at(3), at(5)]
}

/** Contrast ratio of two colours, 1 to 21 (WCAG 2.2, relative luminance and contrast ratio). */
export function contrast(one: string, other: string): number {
  const [high = 0, low = 0] = [luminance(one), luminance(other)].sort((a, b) => b - a)
  return (high + 0.05) / (low + 0.05)
}

function luminance(hex: string): number {
  const [r, g, b] = rgb(hex).map((part) => {
    const share = part / 255
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4
  })
  return 0.2126 * (r ?? 0) + 0.7152 * (g ?? 0) + 0.0722 * (b ?? 0)
}
