import { converter, parse } from 'culori'
import type { Lab } from './paint'

const toLab = converter('lab65')

/** Three numbers, as an instrument shows them: 50 20 30, or with commas, or with the letters before them. */
const THREE = /^(?:lab\s*)?\(?\s*L?\*?\s*=?\s*([-+]?[\d.]+)\s*[,;\s]\s*a?\*?\s*=?\s*([-+]?[\d.]+)\s*[,;\s]\s*b?\*?\s*=?\s*([-+]?[\d.]+)\s*\)?$/i

/**
 * A colour as a painter types it: three figures are CIELAB under D65; anything else is read as a CSS colour.
 *
 * @returns null for what is no colour
 */
export function readColour(typed: string): Lab | null {
  const text = typed.trim().replace(/−/g, '-')
  if (text === '') return null
  const three = THREE.exec(text)
  if (three) return within([Number(three[1]), Number(three[2]), Number(three[3])])
  const lab = toLab(parse(text))
  return lab ? within([lab.l, lab.a ?? 0, lab.b ?? 0]) : null
}

/** A colour as it is written back into a field. */
export function colourTyped(lab: Lab): string {
  return lab.map(value => String(Number(value.toFixed(1)))).join(' ')
}

function within([L, a, b]: Lab): Lab | null {
  if (![L, a, b].every(Number.isFinite)) return null
  if (L < 0 || L > 100.5 || Math.abs(a) > 150 || Math.abs(b) > 150) return null
  const round = (value: number) => Number(value.toFixed(2))
  return [Math.min(100, round(L)), round(a), round(b)]
}
