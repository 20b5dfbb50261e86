import { newBodySampler } from '#shared/blank/body-sample'
import { finPlace, type FinOutline } from '#shared/blank/fin-outline'
import { newFinScratch, writeFinSample } from '#shared/blank/fin-sample'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { emptyViewSamples, PART_NONE, type ViewSamples } from '#shared/blank/view-sample-lists'
import type { SheetSize } from './body-sheet'

/** Room round each fin, mm: it is painted on as the fin would go on, so that nothing bleeds in at the rim. */
const MARGIN = 0.8
const SIDE_MOST = 4096

/** How the fins of a blank lie on one sheet, mm: one below the other, the left face of each and its right face beside it. */
export interface FinLayout {
  wide: number
  high: number
  /** From where, down the sheet, each fin lies. */
  tops: readonly number[]
}

/** Lays the fins of a blank out. Undefined when it has none. */
export function finLayout({ fins }: PreparedBlank): FinLayout | undefined {
  if (fins.length === 0) return undefined
  let high = 0
  const tops = fins.map((fin) => {
    const top = high
    high += heightOf(fin)
    return top
  })
  return { wide: 2 * Math.max(...fins.map(widthOf)), high, tops }
}

const widthOf = (fin: FinOutline) => fin.right - fin.left + 2 * MARGIN
const heightOf = (fin: FinOutline) => fin.high - fin.low + 2 * MARGIN

/** Place on the sheet, 0-1, of a place (x, y) mm of a fin's face. */
export function finSheetPlace({ wide, high, tops }: FinLayout, fin: FinOutline, index: number, x: number, y: number, side: 1 | -1): [right: number, down: number] {
  const right = (x - fin.left + MARGIN) / wide + (side > 0 ? 0 : 0.5)
  return [right, (tops[index]! + MARGIN + fin.high - y) / high]
}

/** Size of the sheet at some texels to the mm; an even number of columns, because both faces have as many. */
export function finSheetSize({ wide, high }: FinLayout, scale: number): SheetSize {
  const fits = Math.min(scale, SIDE_MOST / wide, SIDE_MOST / high)
  return { width: 2 * Math.max(8, Math.round(wide * fits / 2)), height: Math.max(8, Math.round(high * fits)) }
}

/** Both faces of every fin laid out on their sheet: one sample a texel, row by row, with directions of the body. */
export function finSheet(blank: PreparedBlank, layout: FinLayout, scale: number): ViewSamples & SheetSize {
  const { width, height } = finSheetSize(layout, scale)
  const view = { roll: 0, nose: 'left' as const, width, height, scale, centreX: 0, centreY: 0 }
  const samples = emptyViewSamples(view, width * height)
  const sampler = newBodySampler(blank, view)
  const scratch = newFinScratch()
  for (let row = 0; row < height; row++) {
    const down = (row + 0.5) * layout.high / height
    const index = Math.max(0, layout.tops.findLastIndex(top => top <= down))
    const fin = blank.fins[index]!
    const y = fin.high - (down - layout.tops[index]! - MARGIN)
    for (let column = 0; column < width / 2; column++) {
      const x = fin.left + (column + 0.5) * layout.wide / width - MARGIN
      const at = row * width + column
      samples.pixel[at] = at
      finPlace(fin, x, y, scratch.place)
      // Far beside the fin nothing is ever seen.
      const isBeside = scratch.place.rim < -2 * MARGIN
      writeFinSample(sampler, index, fin, x, y, scratch, samples, at)
      if (isBeside) samples.part[at] = PART_NONE
      toOtherFace(samples, at, at + width / 2)
    }
  }
  return { ...samples, width, height }
}

/** Writes the texel of a fin's right face behind one of its left. */
function toOtherFace(samples: ViewSamples, from: number, to: number): void {
  for (const key of ['U', 'V', 'u', 'v', 'part', 'occlusion', 'rootToTip', 'rim', 'raySlope'] as const) samples[key][to] = samples[key][from]!
  samples.pixel[to] = to
  samples.side[to] = -1
  samples.section[2 * to] = samples.section[2 * from]!
  for (const key of ['bodyNormal', 'normal', 'glossNormal'] as const) {
    const list = samples[key]
    list[3 * to] = list[3 * from]!
    list[3 * to + 1] = list[3 * from + 1]!
    list[3 * to + 2] = -list[3 * from + 2]!
  }
}
