import { goToColumn, xAtPixel, type BodySampler } from './body-sample'

/** An outline that falls off more steeply than this (as the cosine of its slope) is cut strip by strip. */
export const STEEP = 0.55
/** Upright strips a pixel is cut into where its outline is steep: round noses and tails. */
const STRIPS = 4

/** Where a strip of the body begins and ends, pixels from the top. */
export type Edges = readonly [top: number, bottom: number]

/** Where the current column begins and ends in the picture, pixels from the top. */
export function columnEdges({ view, turn, column }: BodySampler): Edges {
  const [a, b] = [view.centreY - turn.way * view.scale * column.high, view.centreY - turn.way * view.scale * column.low]
  return [Math.min(a, b), Math.max(a, b)]
}

const stripX = (sampler: BodySampler, px: number, k: number) => xAtPixel(sampler, px + (k + 0.5) / STRIPS)

/** Goes to the middle of a column of pixels, or where the body ends in it (`isCut`), to the strip of it that lies farthest inside. */
export function goToPixelColumn(sampler: BodySampler, px: number): { x: number, isCut: boolean } | undefined {
  const middle = xAtPixel(sampler, px + 0.5)
  if (goToColumn(sampler, middle)) return { x: middle, isCut: false }
  for (const k of [STRIPS - 1, 0]) {
    const x = stripX(sampler, px, k)
    if (goToColumn(sampler, x)) return { x, isCut: true }
  }
  return undefined
}

/** The strips of a column of pixels; those beside the body are empty. */
export function stripsOf(sampler: BodySampler, px: number): Edges[] {
  const strips: Edges[] = []
  for (let k = 0; k < STRIPS; k++) if (goToColumn(sampler, stripX(sampler, px, k))) strips.push(columnEdges(sampler))
  return strips
}

/** Share of a pixel, `py` from the top, that its strips fill. */
export function stripShare(strips: readonly Edges[], py: number): number {
  let sum = 0
  for (const [top, bottom] of strips) sum += Math.max(0, Math.min(py + 1, bottom) - Math.max(py, top))
  return sum / STRIPS
}
