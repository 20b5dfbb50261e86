import type { FlatPoint } from './flat'
import { SvgRefusal } from './svg-refusal'

/** An SVG transform: x' = a·x + c·y + e, y' = b·x + d·y + f. */
export type SvgMatrix = readonly [a: number, b: number, c: number, d: number, e: number, f: number]

export const SAME: SvgMatrix = [1, 0, 0, 1, 0, 0]

/** First the inner, then the outer. */
export function within(outer: SvgMatrix, inner: SvgMatrix): SvgMatrix {
  const [a, b, c, d, e, f] = outer
  const [g, h, i, j, k, l] = inner
  return [a * g + c * h, b * g + d * h, a * i + c * j, b * i + d * j, a * k + c * l + e, b * k + d * l + f]
}

/** A place after a transform. */
export function moved([a, b, c, d, e, f]: SvgMatrix, [x, y]: FlatPoint): FlatPoint {
  return [a * x + c * y + e, b * x + d * y + f]
}

const radians = (degrees: number) => degrees * Math.PI / 180

function one(name: string, all: readonly number[]): SvgMatrix | null {
  const count = all.length
  const [p = 0, q, r] = all
  switch (name) {
    case 'matrix': return count === 6 ? [all[0] ?? 1, all[1] ?? 0, all[2] ?? 0, all[3] ?? 1, all[4] ?? 0, all[5] ?? 0] : null
    case 'translate': return count === 1 || count === 2 ? [1, 0, 0, 1, p, q ?? 0] : null
    case 'scale': return count === 1 || count === 2 ? [p, 0, 0, q ?? p, 0, 0] : null
    case 'rotate': {
      if (count !== 1 && count !== 3) return null
      const [cos, sin] = [Math.cos(radians(p)), Math.sin(radians(p))]
      const turned: SvgMatrix = [cos, sin, -sin, cos, 0, 0]
      return within(within([1, 0, 0, 1, q ?? 0, r ?? 0], turned), [1, 0, 0, 1, -(q ?? 0), -(r ?? 0)])
    }
    case 'skewX': return count === 1 ? [1, 0, Math.tan(radians(p)), 1, 0, 0] : null
    case 'skewY': return count === 1 ? [1, Math.tan(radians(p)), 0, 1, 0, 0] : null
    default: return null
  }
}

/**
 * Reads a `transform` attribute.
 * @throws {SvgRefusal} for anything that is not one
 */
export function readTransform(value: string | undefined): SvgMatrix {
  const written = value?.trim() ?? ''
  if (written === '' || written === 'none') return SAME
  let matrix = SAME
  const rest = written.replace(/([a-zA-Z]+)\s*\(([^()]*)\)[\s,]*/g, (_, name: string, list: string) => {
    const numbers = list.trim().split(/[\s,]+/).map(Number)
    const next = numbers.every(Number.isFinite) ? one(name, numbers) : null
    if (!next) throw new SvgRefusal(`It is transformed in a way that cannot be read: “${name}(${list.slice(0, 40)})”.`)
    matrix = within(matrix, next)
    return ''
  })
  if (rest !== '') throw new SvgRefusal(`It is transformed in a way that cannot be read: “${rest.slice(0, 40)}”.`)
  return matrix
}
