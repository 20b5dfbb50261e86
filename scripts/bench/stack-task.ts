import { filmInto, overGround } from '#shared/optics/film'
import { coefficientsIn } from '#shared/optics/coat-layer'
import { SURFACE_INSIDE, SURFACE_OUTSIDE } from '#shared/optics/surface'
import { PICTURE_LINEAR_WEIGHTS } from '#shared/optics/to-picture-bands'
import { emptyViewSamples } from '#shared/blank/view-sample-lists'
import { lightTables } from '#shared/picture/light-tables'
import { bareGround, layCoats } from '#shared/picture/compose'
import { coatTable, type CoatTable } from '#shared/picture/coat-table'
import { SEEN_DAYLIGHT } from '#shared/picture/engine/seen-daylight'
import type { LightAsk } from '#shared/picture/engine/picture-engine'
import type { SampleForm } from '#shared/picture/paint-light'
import type { KeyedCoat, ViewKit } from '#shared/picture/view-kit'
import type { PaintOptics } from '#shared/optics/paint-optics'
import { demoOptics } from '../../tests/fixtures/demo-looks'

/** Passes where a coat lies thickest. */
const PEAK = 2.5
/** Film paints, opaque and clear in turn, as many as there are coats. */
const PAINTS = ['Opaque white', 'Olive green', 'Tan', 'Candy red', 'Pale yellow', 'Smoke', 'Signal red', 'Blue-green', 'Cream', 'Candy amber', 'Umber', 'Rose'] as const

/** A piece of so many pixels under so many coats of which each varies from pixel to pixel, or none does. */
export interface StackTask {
  width: number
  height: number
  paints: PaintOptics[]
  codes: Uint8Array[]
  tables: CoatTable[]
  ground: Float64Array
}

/** Lays out the task: smooth waves of deposit, each coat its own, from nothing to all of it. */
export function stackTask(width: number, height: number, coats: number, isEven = false): StackTask {
  const paints = Array.from({ length: coats }, (_, c) => demoOptics(PAINTS[c % PAINTS.length]!))
  const codes = paints.map((_, c) => {
    const out = new Uint8Array(width * height)
    for (let i = 0; i < out.length; i++) {
      const x = i % width / width, y = Math.floor(i / width) / height
      out[i] = isEven ? 120 : 128 + 120 * Math.sin(2 * Math.PI * ((c % 5 + 1) * x + 0.13 * c) + c) * Math.cos(2 * Math.PI * (c % 3 + 1) * y + 0.7 * c)
    }
    return out
  })
  return { width, height, paints, codes, tables: paints.map(optics => coatTable(optics, PEAK)), ground: new Float64Array(16).fill(0.7) }
}

/** Every coat of every pixel by the formula of its film at its own thickness; 16 bands to linear red, green and blue. */
export function exactPerPixel({ paints, codes, ground }: StackTask): Float32Array {
  const count = codes[0]!.length, out = new Float32Array(3 * count)
  const films = paints.map(optics => coefficientsIn(optics, 'picture16'))
  const pair = new Float64Array(2), running = new Float64Array(16)
  for (let i = 0; i < count; i++) {
    running.set(ground)
    films.forEach(({ K, S }, c) => {
      const passes = PEAK * (codes[c]![i]! / 255) ** 2
      for (let b = 0; b < 16; b++) {
        filmInto(K[b]!, S[b]!, passes, pair)
        running[b] = overGround(pair[0]!, pair[1]!, running[b]!)
      }
    })
    project(running, 0, out, i)
  }
  return out
}

/** The films from a table of 256 thicknesses, read on straight lines between them; one division a coat, band and pixel. */
export function linearTable({ codes, tables, ground }: StackTask): Float32Array {
  const count = codes[0]!.length, out = new Float32Array(3 * count), running = new Float64Array(16)
  for (let i = 0; i < count; i++) {
    running.set(ground)
    for (let c = 0; c < tables.length; c++) {
      const { R, T } = tables[c]!
      const place = codes[c]![i]! * 0.9999, low = Math.floor(place), share = place - low
      for (let b = 0; b < 16; b++) {
        const at = low * 16 + b
        running[b] = overGround(R[at]! + share * (R[at + 16]! - R[at]!), T[at]! + share * (T[at + 16]! - T[at]!), running[b]!)
      }
    }
    project(running, 0, out, i)
  }
  return out
}

/** N/D in TypeScript: the plain engine's way. */
export function plainFraction({ codes, tables, ground }: StackTask): Float32Array {
  const count = codes[0]!.length, out = new Float32Array(3 * count)
  const state = layCoats(codes.map((each, c) => ({ codes: each, table: tables[c]! })), bareGround(count, ground))
  for (let i = 0; i < count; i++) project(state, 16 * i, out, i)
  return out
}

function project(state: ArrayLike<number>, from: number, out: Float32Array, i: number): void {
  let red = 0, green = 0, blue = 0
  for (let b = 0; b < 16; b++) {
    const seen = state[from + b]! / (1 - SURFACE_INSIDE * state[from + b]!)
    red += PICTURE_LINEAR_WEIGHTS[b]! * seen
    green += PICTURE_LINEAR_WEIGHTS[16 + b]! * seen
    blue += PICTURE_LINEAR_WEIGHTS[32 + b]! * seen
  }
  const through = (1 - SURFACE_OUTSIDE) * (1 - SURFACE_INSIDE)
  out[3 * i] = through * red
  out[3 * i + 1] = through * green
  out[3 * i + 2] = through * blue
}

/** The task as an engine is asked for it: plain light, so that every engine does the stack and nothing else. */
export function askOf({ width, height, codes, tables, ground }: StackTask): { kit: ViewKit, ask: LightAsk } {
  const samples = emptyViewSamples({ roll: 0, nose: 'left', width, height, scale: 1, centreX: 0, centreY: 0 }, width * height)
  samples.occlusion.fill(1)
  const normal = new Float32Array(3 * samples.count).map((_, i) => i % 3 === 2 ? 1 : 0)
  const form: SampleForm = { samples, normal, glossNormal: normal, sparkle: new Float32Array(samples.count) }
  const kit = { samples, form, blindForm: form } as unknown as ViewKit // an engine asks no more of a kit than its being there
  const coats = codes.map((each, c): KeyedCoat => ({ key: `${c}`, codes: each, table: tables[c]! }))
  return { kit, ask: { groundKey: 'ground', ground, coats, form, lighting: { tables: lightTables('bench'), finish: 'gloss', plain: true, aspecular: 45, seen: SEEN_DAYLIGHT } } }
}
