import { SvgRefusal, type SvgNode } from './svg-refusal'
import { lengthOr } from './svg-sheet'

/** An element's outline as path data; null for an element that draws none. */
export function shapePath({ name, attributes }: SvgNode): string | null {
  const at = (key: string, usual = 0) => lengthOr(attributes[key], usual)
  switch (name) {
    case 'path': return attributes.d ?? ''
    case 'polygon':
    case 'polyline': return polygonPath(attributes.points ?? '')
    case 'rect': return rectPath(at('x'), at('y'), at('width'), at('height'), attributes.rx, attributes.ry)
    case 'circle': return ellipsePath(at('cx'), at('cy'), at('r'), at('r'))
    case 'ellipse': return ellipsePath(at('cx'), at('cy'), at('rx'), at('ry'))
    case 'line': return `M${at('x1')} ${at('y1')}L${at('x2')} ${at('y2')}`
    default: return null
  }
}

function polygonPath(points: string): string {
  const numbers = points.trim().split(/[\s,]+/).filter(Boolean).map(Number)
  if (!numbers.every(Number.isFinite) || numbers.length % 2 === 1) throw new SvgRefusal('One of its polygons cannot be read.')
  const places = Array.from({ length: numbers.length / 2 }, (_, i) => `${numbers[2 * i]} ${numbers[2 * i + 1]}`)
  return places.length === 0 ? '' : `M${places.join('L')}Z`
}

function ellipsePath(cx: number, cy: number, rx: number, ry: number): string {
  if (!(rx > 0) || !(ry > 0)) return ''
  return `M${cx - rx} ${cy}A${rx} ${ry} 0 1 1 ${cx + rx} ${cy}A${rx} ${ry} 0 1 1 ${cx - rx} ${cy}Z`
}

function rectPath(x: number, y: number, width: number, height: number, rxWritten?: string, ryWritten?: string): string {
  if (!(width > 0) || !(height > 0)) return ''
  const rx = Math.min(width / 2, Math.max(0, lengthOr(rxWritten ?? ryWritten, 0)))
  const ry = Math.min(height / 2, Math.max(0, lengthOr(ryWritten ?? rxWritten, 0)))
  if (rx === 0 || ry === 0) return `M${x} ${y}H${x + width}V${y + height}H${x}Z`
  const corner = (toX: number, toY: number) => `A${rx} ${ry} 0 0 1 ${toX} ${toY}`
  return `M${x + rx} ${y}H${x + width - rx}${corner(x + width, y + ry)}V${y + height - ry}${corner(x + width - rx, y + height)}H${x + rx}${corner(x, y + height - ry)}V${y + ry}${corner(x + rx, y)}Z`
}
