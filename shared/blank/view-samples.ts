import { goToColumn, heightAtPixel, newBodySampler, writeBodySample, xAtPixel, type BodySampler } from './body-sample'
import { FIN_EDGE_ON, newFinScratch, rimDistance, standsOut, writeFinSample, type FinScratch } from './fin-sample'
import { columnEdges, goToPixelColumn, STEEP, stripShare, stripsOf } from './outline-strips'
import type { PreparedBlank } from './prepared-blank'
import { newSection, tOfShare } from './profile'
import { outlineSlope } from './view-column'
import { emptyViewSamples, PART_NONE, type ViewSamples } from './view-sample-lists'
import type { View } from './view'

export { emptyViewSamples, PART_BODY, PART_FIN, PART_GAP, PART_NONE, samplesTransfer, type ViewSamples } from './view-sample-lists'
export { fitView, type ViewWish } from './fit-view'
export type { View } from './view'

/** What is already drawn: the share of each pixel, and 1 + the number of its body sample (0 for none). */
interface Canvas {
  covered: Float32Array
  bodyAt: Uint32Array
}

const clamp = (value: number) => Math.min(1, Math.max(0, value))

/** Enough room for a view: every section fits in a box of its own height and width. */
function roomNeeded(sampler: BodySampler): number {
  const { blank, view, turn } = sampler
  const section = newSection()
  let room = 0
  for (let px = 0; px < view.width; px++) {
    // Where the outline is steep, a column is as tall as its tallest strip.
    let most = 0
    for (const place of [0, 0.5, 1]) {
      const x = xAtPixel(sampler, px + place)
      if (x <= 0 || x >= blank.shape.length) continue
      blank.profile.section(tOfShare(x / blank.shape.length), section)
      most = Math.max(most, (section.h + Math.abs(section.g)) * Math.abs(turn.cos) + section.w * Math.abs(turn.sin))
    }
    if (most > 0) room += Math.ceil(2 * view.scale * most) + 6
  }
  for (const fin of blank.fins) {
    room += (Math.ceil((fin.right - fin.left) * view.scale) + 5) * (Math.ceil((fin.high - fin.low) * view.scale) + 5)
  }
  return room
}

/** Turns a distance measured up the column into one across an outline of that slope. */
const across = (slope: number) => 1 / Math.sqrt(1 + slope * slope)

function cut(samples: ViewSamples, count: number): ViewSamples {
  return {
    view: samples.view,
    count,
    pixel: samples.pixel.slice(0, count),
    coverage: samples.coverage.slice(0, count),
    part: samples.part.slice(0, count),
    normal: samples.normal.slice(0, 3 * count),
    glossNormal: samples.glossNormal.slice(0, 3 * count),
    bodyNormal: samples.bodyNormal.slice(0, 3 * count),
    section: samples.section.slice(0, 2 * count),
    U: samples.U.slice(0, count),
    V: samples.V.slice(0, count),
    u: samples.u.slice(0, count),
    v: samples.v.slice(0, count),
    side: samples.side.slice(0, count),
    occlusion: samples.occlusion.slice(0, count),
    rootToTip: samples.rootToTip.slice(0, count),
    rim: samples.rim.slice(0, count),
    raySlope: samples.raySlope.slice(0, count),
  }
}

function addBody(sampler: BodySampler, samples: ViewSamples, { covered, bodyAt }: Canvas): number {
  const { view, turn } = sampler
  const pixel = 1 / view.scale
  let count = 0
  for (let px = 0; px < view.width; px++) {
    const ends = goToPixelColumn(sampler, px)
    if (!ends) continue
    const { high, low, phiHigh, phiLow } = sampler.column
    const acrossHigh = across(outlineSlope(sampler.column, turn, phiHigh, sampler.point))
    const acrossLow = across(outlineSlope(sampler.column, turn, phiLow, sampler.point))
    const strips = ends.isCut || Math.min(acrossHigh, acrossLow) < STEEP ? stripsOf(sampler, px) : null
    if (strips) goToColumn(sampler, ends.x)
    const edges = strips?.flat() ?? columnEdges(sampler)
    const first = Math.max(0, Math.floor(Math.min(...edges)))
    const last = Math.min(view.height - 1, Math.floor(Math.max(...edges)))
    // A pixel cut by the outline is sampled a little inside it, where most of what shows of it lies.
    const inset = Math.min(0.25 * pixel, 0.25 * (high - low))
    for (let py = first; py <= last; py++) {
      const height = heightAtPixel(sampler, py + 0.5)
      const seen = Math.min(high - inset, Math.max(low + inset, height))
      const kept = writeBodySample(sampler, seen, samples, count) - Math.min(high - seen, seen - low)
      const cosine = high - height < height - low ? acrossHigh : acrossLow
      const share = clamp(strips
        ? stripShare(strips, py) + kept * cosine * view.scale
        : 0.5 + (Math.min(high - height, height - low) + kept) * cosine * view.scale)
      if (share <= 0.004) continue
      const index = py * view.width + px
      samples.pixel[count] = index
      samples.coverage[count] = share
      covered[index] = share
      bodyAt[index] = count + 1
      count++
    }
  }
  return count
}

/** Takes a share of a pixel away from the body, for a fin that stands before it. @returns the share the fin then has */
function coverBody(samples: ViewSamples, { covered, bodyAt }: Canvas, pixel: number, share: number): number {
  const body = (bodyAt[pixel] ?? 0) - 1
  const total = covered[pixel] ?? 0
  if (body < 0) return Math.min(1 - total, share)
  const had = samples.coverage[body] ?? 0
  const others = total - had
  const fin = Math.min(share, 1 - others)
  samples.coverage[body] = Math.min(had, 1 - others - fin)
  covered[pixel] = others + (samples.coverage[body] ?? 0)
  return fin
}

function addFins(sampler: BodySampler, samples: ViewSamples, canvas: Canvas, from: number): number {
  const { view, turn, blank } = sampler
  if (Math.abs(turn.cos) < FIN_EDGE_ON) return from
  const { covered } = canvas
  const scratch = newFinScratch()
  const reach = 1 / view.scale
  const mayStandBefore = turn.sin !== 0
  // Pixels for each mm of height, as this view foreshortens it.
  const upright = view.scale * Math.abs(turn.cos)
  let count = from
  blank.fins.forEach((fin, index) => {
    const pxAt = (x: number) => view.centreX + turn.way * view.scale * (x - blank.shape.length / 2)
    const pyAt = (y: number) => view.centreY - turn.way * view.scale * y * turn.cos
    const [x0, x1] = [pxAt(fin.left), pxAt(fin.right)]
    const [y0, y1] = [pyAt(fin.low), pyAt(fin.high)]
    const right = Math.min(view.width - 1, Math.floor(Math.max(x0, x1)) + 1)
    const bottom = Math.min(view.height - 1, Math.floor(Math.max(y0, y1)) + 1)
    for (let py = Math.max(0, Math.floor(Math.min(y0, y1)) - 1); py <= bottom; py++) {
      const y = heightAtPixel(sampler, py + 0.5) / turn.cos
      for (let px = Math.max(0, Math.floor(Math.min(x0, x1)) - 1); px <= right; px++) {
        const pixel = py * view.width + px
        const free = 1 - (covered[pixel] ?? 0)
        if (free <= 0.004 && !mayStandBefore) continue
        const x = xAtPixel(sampler, px + 0.5)
        const full = clamp(0.5 + rimDistance(fin, x, y, reach, scratch) * view.scale)
        if (full <= 0.004) continue
        const before = mayStandBefore ? clamp(0.5 + standsOut(sampler, x, y, scratch) * upright) : 0
        const share = before > 0 ? coverBody(samples, canvas, pixel, Math.min(full, Math.max(free, before))) : Math.min(free, full)
        if (share <= 0.004) continue
        writeFinSample(sampler, index, fin, x, y, scratch, samples, count)
        samples.pixel[count] = pixel
        samples.coverage[count] = share
        covered[pixel] = (covered[pixel] ?? 0) + share
        count++
      }
    }
  })
  return count
}

/** Everything a view shows of the painted blank, one sample a pixel and part, at pixel centres; body first, then fins. */
export function viewSamples(blank: PreparedBlank, view: View): ViewSamples {
  const sampler = newBodySampler(blank, view)
  const samples = emptyViewSamples(view, roomNeeded(sampler))
  const pixels = view.width * view.height
  const canvas: Canvas = { covered: new Float32Array(pixels), bodyAt: new Uint32Array(pixels) }
  const bodies = addBody(sampler, samples, canvas)
  return cut(samples, addFins(sampler, samples, canvas, bodies))
}

/** Writes sample i on the fin at a place, if there is one; with `onlyBefore`, only a fin that stands before the body. */
function addFinPoint(
  sampler: BodySampler, x: number, height: number, onlyBefore: boolean, scratch: FinScratch, samples: ViewSamples, i: number,
): boolean {
  const { turn, blank } = sampler
  if (Math.abs(turn.cos) < FIN_EDGE_ON) return false
  const y = height / turn.cos
  return blank.fins.some((fin, index) => {
    if (!(rimDistance(fin, x, y, 0, scratch) > 0)) return false
    if (onlyBefore && !(standsOut(sampler, x, y, scratch) > 0)) return false
    writeFinSample(sampler, index, fin, x, y, scratch, samples, i)
    return true
  })
}

/**
 * Samples chosen pixels at chosen places inside them, for edges that need more than one sample.
 * @param pixels row · width + column of each pixel
 * @param offsets places inside a pixel, pairs (right, down) from its upper left corner, 0-1
 * @returns sample k of pixel i at place i · (offsets.length / 2) + k; each covers 1 or, where nothing is hit, 0
 */
export function subpixelSamples(blank: PreparedBlank, view: View, pixels: Uint32Array, offsets: Float32Array): ViewSamples {
  const each = offsets.length / 2
  const sampler = newBodySampler(blank, view)
  const scratch = newFinScratch()
  const samples = emptyViewSamples(view, pixels.length * each)
  // Column by column, because the pixels of a column share its section.
  const order = Uint32Array.from(pixels.keys()).sort((a, b) => ((pixels[a] ?? 0) % view.width) - ((pixels[b] ?? 0) % view.width))
  for (let k = 0; k < each; k++) {
    let column = -1
    let [x, isOnBody] = [0, false]
    for (const i of order) {
      const pixel = pixels[i] ?? 0
      const px = pixel % view.width
      if (px !== column) {
        column = px
        x = xAtPixel(sampler, px + (offsets[2 * k] ?? 0.5))
        isOnBody = goToColumn(sampler, x)
      }
      const at = i * each + k
      const height = heightAtPixel(sampler, Math.floor(pixel / view.width) + (offsets[2 * k + 1] ?? 0.5))
      samples.pixel[at] = pixel
      samples.coverage[at] = 1
      const { high, low } = sampler.column
      if (sampler.turn.sin !== 0 && addFinPoint(sampler, x, height, true, scratch, samples, at)) continue
      if (isOnBody && height < high && height > low && writeBodySample(sampler, height, samples, at) > 0) continue
      if (addFinPoint(sampler, x, height, false, scratch, samples, at)) continue
      samples.part[at] = PART_NONE
      samples.coverage[at] = 0
    }
  }
  return samples
}
