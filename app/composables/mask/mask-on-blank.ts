import { prepareBlank, type PreparedBlank } from '#shared/blank/prepared-blank'
import { builtInBlank } from '#shared/blank/built-in-blanks'
import { sideOutline, svgPath, type DrawingPoint, type SideOutline } from '#shared/blank/side-outline'
import { placeOnSurface } from '#shared/blank/surface-coordinates'
import type { Place } from '#shared/scheme/mark'

/** A blank made ready for masks to be drawn on it. */
export interface MaskBlank { blank: PreparedBlank, outline: SideOutline }

/** The blank masks are shown on: a plain body of 90 mm without joints. */
export function maskBlank(): MaskBlank {
  const shape = builtInBlank('minnow-90')
  return { blank: prepareBlank(shape), outline: sideOutline(shape) }
}

const within = (value: number) => Math.min(1, Math.max(0, value))

/** Outlines of a stencil on the left flank of a blank, as SVG path data in mm; what lies beyond the body ends at its edge. */
export function outlinesOnBlank({ blank }: MaskBlank, outlines: readonly (readonly Place[])[]): string {
  return outlines.map(outline => svgPath(outline.map(([u, v]): DrawingPoint => {
    const { position } = placeOnSurface(blank, within(u), within(v), 1)
    return [position[0], -position[1]]
  }))).join('')
}

/** Half the girth of a common body as a share of its length: what a flat plate is drawn with. */
const HALF_GIRTH = 0.3

/** Outlines of a stencil laid flat, as SVG path data: 100 long, with the back above. */
export function outlinesFlat(outlines: readonly (readonly Place[])[]): string {
  return outlines.map(outline => svgPath(outline.map(([u, v]): DrawingPoint => [100 * u, 100 * HALF_GIRTH * v]))).join('')
}
