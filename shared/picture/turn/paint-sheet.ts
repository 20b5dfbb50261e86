import { BANDS } from '../coat-table'
import { layCoats, type LaidTable } from '../compose'
import type { SeenLight } from '../engine/seen-daylight'
import { GLINT_LEAST } from '../flake-light'
import { glowLight } from '../glow-light'
import { flakeGroups, groupOf, SHEET_COSINES, TABLE_ROWS } from './flake-groups'
import { toHalf } from './half-float'

/** Half floats, four a texel: red, green, blue, and one that says nothing. */
export type HalfSheet = Uint16Array<ArrayBuffer>

/**
 * The colours of a stack, texel by texel, as a lamp that turns round it needs them; linear sRGB.
 * What the eye sees of a texel is `base` · light + Σ of the groups: strength of their lobe · their rows at its local cosine.
 */
export interface PaintSheet {
  /** What goes to all sides where irradiance is 1: paint, glow, less what flakes move elsewhere. */
  base: HalfSheet
  /** For each spread of tilt what its flakes mirror, as far as the coats above let it, at the three cosines of a sheet. */
  flakes: { sigma: number, rows: [near: HalfSheet, between: HalfSheet, far: HalfSheet] }[]
}

/** What a sheet is painted with. */
export interface SheetPaint {
  /** The coats shown, from the ground up: a code per texel. */
  coats: readonly LaidTable[]
  /** Reflectance inside the ground, 16 bands. */
  ground: ArrayLike<number>
  /** Glint of flakes, unit noise per texel. */
  sparkle: Float32Array
  seen: SeenLight
}

/** Texels worked through at a time. */
const BLOCK = 1024
const ROWS = SHEET_COSINES.length
/** Texels between two breaths of whoever does other work besides, and may call the painting off. */
const BREATH = 16 * BLOCK

/** Paints a sheet of `count` texels. It hands over from time to time, so that whoever asked can do something else or stop. */
export function* paintSheet(count: number, paint: SheetPaint): Generator<undefined, PaintSheet, undefined> {
  const groups = flakeGroups(paint.coats)
  const empty = () => new Uint16Array(4 * count)
  const sheet: PaintSheet = { base: empty(), flakes: groups.map(sigma => ({ sigma, rows: [empty(), empty(), empty()] })) }
  const block = blockOf(paint, groups)
  for (let from = 0; from < count; from += BLOCK) {
    paintBlock(paint, block, from, Math.min(BLOCK, count - from), sheet)
    if (from % BREATH === 0) yield undefined
  }
  return sheet
}

/** Room for one block of texels. */
interface Block {
  groups: readonly number[]
  lowestFlake: number
  ground: Float32Array
  film: Float32Array
  reaching: Float64Array
  /** Linear sRGB, three a texel: the base, then for each group its three rows. */
  base: Float64Array
  rows: Float64Array[]
}

function blockOf({ coats, ground }: SheetPaint, groups: readonly number[]): Block {
  const bare = new Float32Array(BLOCK * BANDS)
  for (let i = 0; i < BLOCK; i++) bare.set(Float32Array.from(ground), i * BANDS)
  const lowestFlake = coats.findIndex(({ table }) => table.flake)
  return {
    groups, lowestFlake, ground: bare, film: new Float32Array(BLOCK * BANDS), reaching: new Float64Array(BLOCK * BANDS),
    base: new Float64Array(3 * BLOCK), rows: Array.from({ length: groups.length * ROWS }, () => new Float64Array(3 * BLOCK)),
  }
}

function paintBlock(paint: SheetPaint, block: Block, from: number, size: number, sheet: PaintSheet): void {
  const here = paint.coats.map(({ codes, table }) => ({ codes: codes.subarray(from, from + size), table }))
  const film = layCoats(here, block.ground.subarray(0, size * BANDS), block.film.subarray(0, size * BANDS))
  const { inside, outside } = paint.seen.surface
  const through = (1 - outside) * (1 - inside)
  for (let i = 0; i < size * BANDS; i++) film[i] = through * film[i]! / (1 - inside * film[i]!)
  block.base.fill(0)
  for (let i = 0; i < size; i++) addSeen(film, i * BANDS, paint.seen, 1, block.base, 3 * i)
  const glow = glowLight(here, paint.ground, size, paint.seen)
  if (glow) for (let i = 0; i < glow.length; i++) block.base[i]! += glow[i]!
  if (block.lowestFlake >= 0) addFlakes(paint, here, block, from, size)
  writeHalf(block.base, size, sheet.base, from)
  sheet.flakes.forEach(({ rows }, group) => rows.forEach((row, r) => writeHalf(block.rows[group * ROWS + r]!, size, row, from)))
}

/** Adds a spectrum, 16 bands, as linear sRGB. */
function addSeen(spectrum: ArrayLike<number>, at: number, { reflected }: SeenLight, gain: number, out: Float64Array, to: number): void {
  let red = 0, green = 0, blue = 0
  for (let b = 0; b < BANDS; b++) {
    const value = spectrum[at + b]!
    red += reflected[b]! * value
    green += reflected[BANDS + b]! * value
    blue += reflected[2 * BANDS + b]! * value
  }
  out[to]! += gain * red
  out[to + 1]! += gain * green
  out[to + 2]! += gain * blue
}

/** From the top coat down: what flakes mirror of a light from one side, and what is then missing from the light to all sides. */
function addFlakes({ seen, sparkle }: SheetPaint, coats: readonly LaidTable[], block: Block, from: number, size: number): void {
  const { reaching, rows, base } = block
  reaching.fill(1)
  for (const row of rows) row.fill(0)
  const lit = new Float64Array(BANDS)
  for (let c = coats.length - 1; c >= block.lowestFlake; c--) {
    const { codes, table } = coats[c]!
    const { flake } = table
    const group = flake ? groupOf(block.groups, flake.sigma) * ROWS : 0
    for (let i = 0; i < size; i++) {
      const code = codes[i]!
      if (code <= table.empty) continue
      const above = i * BANDS
      if (flake) {
        for (let b = 0; b < BANDS; b++) lit[b] = reaching[above + b]! * flake.diffuse[code * BANDS + b]!
        addSeen(lit, 0, seen, -1, base, 3 * i)
        const glint = Math.max(GLINT_LEAST, 1 + flake.sparkle * sparkle[from + i]!)
        for (let r = 0; r < ROWS; r++) {
          fillRow(flake.mirrored, code, r, lit)
          for (let b = 0; b < BANDS; b++) lit[b]! *= reaching[above + b]!
          addSeen(lit, 0, seen, glint, rows[group + r]!, 3 * i)
        }
      }
      for (let b = 0; b < BANDS; b++) reaching[above + b]! *= table.through[code * BANDS + b]!
    }
  }
}

/** What flakes mirror at one of the sheet's cosines; the coat's own table lies on straight lines between. */
function fillRow(mirrored: Float32Array, code: number, row: number, out: Float64Array): void {
  const place = row * (TABLE_ROWS - 1) / (ROWS - 1)
  const low = Math.min(TABLE_ROWS - 2, Math.floor(place)), share = place - low
  const at = (code * TABLE_ROWS + low) * BANDS
  for (let b = 0; b < BANDS; b++) out[b] = mirrored[at + b]! + share * (mirrored[at + BANDS + b]! - mirrored[at + b]!)
}

function writeHalf(rgb: Float64Array, size: number, out: HalfSheet, from: number): void {
  for (let i = 0; i < size; i++) {
    const to = 4 * (from + i)
    out[to] = toHalf(rgb[3 * i]!)
    out[to + 1] = toHalf(rgb[3 * i + 1]!)
    out[to + 2] = toHalf(rgb[3 * i + 2]!)
  }
}
