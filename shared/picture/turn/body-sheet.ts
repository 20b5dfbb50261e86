import { type BodyPen, goToSection, newBodyPen, writeBodyAt } from '#shared/blank/body-sample'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { newSection } from '#shared/blank/profile'
import { tOfU } from '#shared/blank/surface-coordinates'
import { hermite, TABLE_COLUMNS } from '#shared/blank/surface-table'
import { viewTurn } from '#shared/blank/view'
import { emptyViewSamples, type ViewSamples } from '#shared/blank/view-sample-lists'
import { eyeSeat, type EyeSeat } from './eye-seat'
import { unitInto } from './unit-into'

/** Size of a sheet, texels. */
export interface SheetSize { width: number, height: number }

/** A body sheet is at least this fine and at most this large, texels a side. */
const SIDE = { least: 16, most: 4096 }

/** Where a place of the skin lies on the body sheet, 0-1: from nose to tail, and once round from the back over the left flank. */
export function sheetPlace(u: number, v: number, side: 1 | -1): [right: number, down: number] {
  return [u, side > 0 ? v / 2 : 1 - v / 2]
}

/** Size of the sheet of a body at some texels to the mm, where the body is longest and fattest. */
export function bodySheetSize({ table }: PreparedBlank, scale: number): SheetSize {
  const girth = 2 * table.halfGirthByU.reduce((most, half) => Math.max(most, half), 0)
  const side = (mm: number) => Math.min(SIDE.most, Math.max(SIDE.least, Math.round(mm * scale)))
  // An even number of rows: both flanks have as many.
  return { width: side(table.widestLength), height: 2 * Math.ceil(side(girth) / 2) }
}

/**
 * The skin of a body laid out on its sheet: one sample a texel, row by row, in the form that deposits are laid on. Directions are
 * those of the body, which are those of a view of the left flank; `pixel` is the texel.
 */
export function bodySheet(blank: PreparedBlank, scale: number): ViewSamples & SheetSize {
  const { width, height } = bodySheetSize(blank, scale)
  const samples = emptyViewSamples({ roll: 0, nose: 'left', width, height, scale, centreX: 0, centreY: 0 }, width * height)
  samples.coverage.fill(1)
  const pen: SheetPen = { body: newBodyPen(blank, viewTurn(samples.view), newSection()), eye: eyeSeat(blank, 1), knot: 0 }
  const half = height / 2
  for (let column = 0; column < width; column++) {
    const t = Math.min(1 - 1e-6, Math.max(1e-6, tOfU(blank.table, (column + 0.5) / width)))
    blank.profile.section(t, pen.body.section)
    goToSection(pen.body)
    pen.knot = 0
    for (let row = 0; row < half; row++) {
      const left = row * width + column, right = (height - 1 - row) * width + column
      writeTexel(pen, (row + 0.5) / half, samples, left)
      mirrorTexel(samples, left, right)
    }
  }
  return { ...samples, width, height }
}

interface SheetPen {
  body: BodyPen
  eye: EyeSeat
  /** Column of the table the last texel lay in; texels come from the back down. */
  knot: number
}

/** How a dome under paint leans away from its middle: evenly, and more at its rim. */
const BLIND_DOME = { lean: 0.55, rim: 0.3 }
const STEP = Math.PI / (TABLE_COLUMNS - 1)

/** Girth angle at an arc length V of the pen's section, from the column the last one lay in on. */
function angleAt(pen: SheetPen, V: number): number {
  const { row } = pen.body
  while (pen.knot < TABLE_COLUMNS - 2 && row.V[pen.knot + 1]! > V) pen.knot++
  const k = pen.knot
  const [a, b] = [row.V[k]!, row.V[k + 1]!]
  let f = a > b ? (a - V) / (a - b) : 0
  for (let round = 0; round < 3; round++) {
    const h = 1e-4
    const value = hermite(a, row.Vf[k]!, b, row.Vf[k + 1]!, STEP, f)
    const slope = (hermite(a, row.Vf[k]!, b, row.Vf[k + 1]!, STEP, f + h) - value) / h
    if (slope < 0) f = Math.min(1, Math.max(0, f - (value - V) / slope))
  }
  return (k + f) * STEP
}

/** Writes the texel at a share v of the left flank. */
function writeTexel(pen: SheetPen, v: number, samples: ViewSamples, i: number): void {
  const { row, section, point } = pen.body
  const V = (1 - 2 * v) * (v < 0.5 ? row.V[0]! : -row.V[TABLE_COLUMNS - 1]!)
  writeBodyAt(pen.body, angleAt(pen, V), samples, i)
  samples.pixel[i] = i
  writeDome(pen.eye, section.x, point.y, point.z, samples, i)
}

/** Without fitted eyes their domes lie under the paint. */
function writeDome({ middle, toTail, up, facing, radius }: EyeSeat, x: number, y: number, z: number, samples: ViewSamples, i: number): void {
  const [dx, dy, dz] = [x - middle[0], y - middle[1], z - middle[2]]
  if (Math.abs(dx) > radius) return
  const a = (dx * toTail[0] + dy * toTail[1] + dz * toTail[2]) / radius, b = (dx * up[0] + dy * up[1] + dz * up[2]) / radius
  const q = Math.hypot(a, b)
  if (q >= 1) return
  const lean = BLIND_DOME.lean + BLIND_DOME.rim * q ** 5
  const out = (c: 0 | 1 | 2) => facing[c] + lean * (a * toTail[c] + b * up[c])
  unitInto(samples.normal, i, out(0), out(1), out(2))
  unitInto(samples.glossNormal, i, out(0), out(1), out(2))
}

/** Writes the texel of the right flank that lies opposite one of the left. */
function mirrorTexel(samples: ViewSamples, from: number, to: number): void {
  for (const key of ['U', 'V', 'u', 'v', 'part', 'occlusion'] as const) samples[key][to] = samples[key][from]!
  samples.pixel[to] = to
  samples.side[to] = -1
  samples.section[2 * to] = samples.section[2 * from]!
  samples.section[2 * to + 1] = -samples.section[2 * from + 1]!
  for (const key of ['bodyNormal', 'normal', 'glossNormal'] as const) {
    const list = samples[key]
    list[3 * to] = list[3 * from]!
    list[3 * to + 1] = list[3 * from + 1]!
    list[3 * to + 2] = -list[3 * from + 2]!
  }
}
