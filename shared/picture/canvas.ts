import { PART_FIN, type ViewSamples } from '#shared/blank/view-sample-lists'
import type { PictureOptions } from './picture-options'
import { decodeChannel } from '#shared/optics/screen-colour'
import { dither, screenCode } from './screen-code'

/** Light of a picture while it is put together: linear, already weighted by how much of each pixel it fills. */
export interface Canvas {
  width: number
  height: number
  /** Three a pixel. */
  light: Float32Array
  /** Share of each pixel that is filled, and the part of it that the body fills. */
  cover: Float32Array
  body: Float32Array
}

/** An empty canvas. */
export function newCanvas(width: number, height: number): Canvas {
  return { width, height, light: new Float32Array(3 * width * height), cover: new Float32Array(width * height), body: new Float32Array(width * height) }
}

/** A copy to draw on further. */
export function copyCanvas({ width, height, light, cover, body }: Canvas): Canvas {
  return { width, height, light: light.slice(), cover: cover.slice(), body }
}

/** A canvas with the light of every sample in its pixel. */
export function canvasOf(samples: ViewSamples, light: Float32Array): Canvas {
  const canvas = newCanvas(samples.view.width, samples.view.height)
  for (let i = 0; i < samples.count; i++) {
    const pixel = samples.pixel[i]!, share = samples.coverage[i]!
    canvas.cover[pixel]! += share
    if (samples.part[i]! < PART_FIN) canvas.body[pixel]! += share
    for (let c = 0; c < 3; c++) canvas.light[3 * pixel + c]! += share * light[3 * i + c]!
  }
  for (let pixel = 0; pixel < canvas.cover.length; pixel++) if (canvas.cover[pixel]! > 1) canvas.cover[pixel] = 1
  return canvas
}

/** Lays light over a pixel; `share` of the pixel is hidden by it, `light` is already weighted. */
export function layOver({ light, cover }: Canvas, pixel: number, share: number, red: number, green: number, blue: number): void {
  const left = 1 - share
  light[3 * pixel] = red + left * light[3 * pixel]!
  light[3 * pixel + 1] = green + left * light[3 * pixel + 1]!
  light[3 * pixel + 2] = blue + left * light[3 * pixel + 2]!
  cover[pixel] = share + left * cover[pixel]!
}

/** Lays light over a pixel but not over the body in it. */
export function layOverFins(canvas: Canvas, pixel: number, share: number, red: number, green: number, blue: number): void {
  const free = 1 - Math.min(1, canvas.body[pixel]!)
  if (free > 0) layOver(canvas, pixel, free * share, free * red, free * green, free * blue)
}

/** Slips light under what a pixel already shows. */
export function layUnder({ light, cover }: Canvas, pixel: number, share: number, red: number, green: number, blue: number): void {
  const left = 1 - cover[pixel]!
  if (left <= 0) return
  light[3 * pixel]! += left * red
  light[3 * pixel + 1]! += left * green
  light[3 * pixel + 2]! += left * blue
  cover[pixel]! += left * share
}

/** Shadow in the surround: blur of three boxes, how far down it falls, and its depth. Shares of the picture; chosen by eye. */
const SHADOW = { box: 0.016, down: 0.045, depth: 0.34 }

/** Softened silhouette, moved down; 0 where there is no shadow. */
export function shadowOf({ width, height, cover }: Canvas): Float32Array {
  const down = Math.round(SHADOW.down * height), radius = Math.max(1, Math.round(SHADOW.box * width / 2))
  const from = new Float32Array(width * height), to = new Float32Array(width * height)
  from.set(cover.subarray(0, width * (height - down)), width * down)
  for (let pass = 0; pass < 3; pass++) {
    blurLines(from, to, height, width, width, 1, radius)
    blurLines(to, from, width, height, 1, width, radius)
  }
  for (let i = 0; i < from.length; i++) from[i]! *= SHADOW.depth
  return from
}

function blurLines(from: Float32Array, to: Float32Array, lines: number, length: number, lineStep: number, step: number, radius: number): void {
  const share = 1 / (2 * radius + 1)
  for (let line = 0; line < lines; line++) {
    const start = line * lineStep
    let sum = 0
    for (let k = 0; k <= radius && k < length; k++) sum += from[start + k * step]!
    for (let k = 0; k < length; k++) {
      to[start + k * step] = sum * share
      if (k + radius + 1 < length) sum += from[start + (k + radius + 1) * step]!
      if (k - radius >= 0) sum -= from[start + (k - radius) * step]!
    }
  }
}

/**
 * Encodes a canvas for the screen.
 *
 * On a surround, light mixes with it in linear light and what nothing covers is exactly the grey that was asked for.
 * Without one, the picture keeps its coverage as straight alpha.
 */
export function encodeCanvas(canvas: Canvas, { surround, shadow }: Pick<PictureOptions, 'surround' | 'shadow'>): Uint8ClampedArray<ArrayBuffer> {
  const shade = shadow ? shadowOf(canvas) : undefined
  return surround === null ? encodeWithAlpha(canvas, shade) : encodeOn(canvas, surround, shade)
}

function encodeOn({ light, cover }: Canvas, surround: number, shade: Float32Array | undefined): Uint8ClampedArray<ArrayBuffer> {
  const rgba = new Uint8ClampedArray(4 * cover.length)
  const behind = decodeChannel(surround / 255)
  for (let pixel = 0; pixel < cover.length; pixel++) {
    const share = cover[pixel]!, at = 4 * pixel
    const dark = shade ? shade[pixel]! : 0
    rgba[at + 3] = 255
    if (share === 0 && dark < 1e-4) {
      rgba[at] = rgba[at + 1] = rgba[at + 2] = surround
      continue
    }
    const rest = (1 - share) * behind * (1 - dark), grain = dither(pixel)
    for (let c = 0; c < 3; c++) rgba[at + c] = screenCode(light[3 * pixel + c]! + rest) + grain
  }
  return rgba
}

function encodeWithAlpha({ light, cover }: Canvas, shade: Float32Array | undefined): Uint8ClampedArray<ArrayBuffer> {
  const rgba = new Uint8ClampedArray(4 * cover.length)
  for (let pixel = 0; pixel < cover.length; pixel++) {
    const share = cover[pixel]!, at = 4 * pixel
    const whole = share + (1 - share) * (shade ? shade[pixel]! : 0)
    if (whole <= 0) continue
    const grain = share > 0 ? dither(pixel) : 0
    for (let c = 0; c < 3; c++) rgba[at + c] = screenCode(light[3 * pixel + c]! / whole) + grain
    rgba[at + 3] = 255 * whole
  }
  return rgba
}
