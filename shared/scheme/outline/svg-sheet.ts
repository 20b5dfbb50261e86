import type { SvgMatrix } from './svg-matrix'
import { SvgRefusal } from './svg-refusal'

/** mm in one of each unit; a pixel is 1/96 of an inch (CSS Values 4, 6.2). */
const MM: Readonly<Record<string, number>> = { 'mm': 1, 'cm': 10, 'Q': 0.25, 'in': 25.4, 'pt': 25.4 / 72, 'pc': 25.4 / 6, 'px': 25.4 / 96, '': 25.4 / 96 }

/** A length as the drawing's own units, or a usual one where none is written. */
export function lengthOr(written: string | undefined, usual: number): number {
  if (written === undefined || written.trim() === '' || written === 'auto') return usual
  const [, figure, unit] = /^\s*([+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?)\s*([a-zA-Z%]*)\s*$/i.exec(written) ?? []
  const mm = Object.hasOwn(MM, unit ?? '') ? MM[unit ?? ''] : undefined
  if (figure === undefined || mm === undefined) throw new SvgRefusal(`A length in it cannot be read: “${written.slice(0, 20)}”.`)
  return Number(figure) * (mm / MM.px!)
}

function sheetMm(written: string | undefined): number | null {
  return written === undefined || written.trim().endsWith('%') || written === 'auto' ? null : lengthOr(written, 0) * MM.px!
}

/**
 * From the drawing's own units to mm about the middle of its sheet, with y up: by its width and height and its view box; a drawing
 * without them is taken at 96 units an inch. Never stretched: the smaller scale counts, as `preserveAspectRatio` has it.
 */
export function sheetMatrix({ width, height, viewBox }: Readonly<Record<string, string>>): SvgMatrix {
  const [mmWide, mmHigh] = [sheetMm(width), sheetMm(height)]
  const px = MM.px!
  if (viewBox === undefined) return [px, 0, 0, -px, -(mmWide ?? 0) / 2, (mmHigh ?? 0) / 2]
  const numbers = viewBox.trim().split(/[\s,]+/).map(Number)
  const [x = 0, y = 0, wide = 0, high = 0] = numbers
  if (numbers.length !== 4 || !numbers.every(Number.isFinite) || !(wide > 0) || !(high > 0)) throw new SvgRefusal(`Its view box cannot be read: “${viewBox.slice(0, 40)}”.`)
  const scales = [mmWide === null ? [] : [mmWide / wide], mmHigh === null ? [] : [mmHigh / high]].flat()
  const scale = scales.length === 0 ? px : Math.min(...scales)
  if (!(scale > 0)) throw new SvgRefusal('Its sheet has no size.')
  return [scale, 0, 0, -scale, -scale * (x + wide / 2), scale * (y + high / 2)]
}
