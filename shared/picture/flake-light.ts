import { flakeGeometry } from '#shared/optics/flake-angles'
import { FLAKE_TABLE_COSINES } from '#shared/optics/flake-table'
import { BANDS, type CoatTable, type FlakeLevels } from './coat-table'
import type { LaidTable } from './compose'
import { atNormal, type LightTables } from './light-tables'
import type { Lighting, SampleForm } from './paint-light'

/** A glint takes no more than this from the light of the flakes round it. */
export const GLINT_LEAST = 0.15
const ROWS = FLAKE_TABLE_COSINES.length
const LOWEST_COSINE = FLAKE_TABLE_COSINES.at(-1)!
/** Samples worked through at a time. */
const BLOCK = 256

/** How strongly flakes mirror the light to the eye at some samples, and where between two rows of their table they are read. */
interface Mirroring { strength: Float64Array, row: Uint8Array, share: Float64Array }

/**
 * Adds what flakes mirror to the light of the samples, from the top coat down.
 *
 * A lamp lights flakes where they lie: their light is moved from all sides to where they mirror it to the eye, weakened by
 * the coats above. Below the lowest coat of flakes there is nothing to do.
 *
 * @param light light on the paint of each sample
 * @param out   linear sRGB, three per sample
 */
export function addFlakeLight(form: SampleForm, coats: readonly LaidTable[], lighting: Lighting, light: Float32Array, out: Float32Array): void {
  const lowest = coats.findIndex(({ table }) => table.flake)
  if (lowest < 0) return
  const { count } = form.samples
  const reaching = new Float64Array(BLOCK * BANDS)
  const mirroring: Mirroring = { strength: new Float64Array(BLOCK), row: new Uint8Array(BLOCK), share: new Float64Array(BLOCK) }
  for (let from = 0; from < count; from += BLOCK) {
    const size = Math.min(BLOCK, count - from)
    reaching.fill(1)
    for (let c = coats.length - 1; c >= lowest; c--) {
      const { codes, table } = coats[c]!
      if (table.flake) {
        findMirroring(form, table.flake, lighting, from, size, mirroring)
        mirrorBlock(codes, table.empty, table.flake, from, size, mirroring, light, reaching, lighting.seen.reflected, out)
      }
      if (c > lowest) weaken(codes, table, from, size, reaching)
    }
  }
}

function weaken(codes: Uint8Array, { through, empty }: CoatTable, from: number, size: number, reaching: Float64Array): void {
  for (let i = 0; i < size; i++) {
    const code = codes[from + i]!
    if (code <= empty) continue
    for (let b = 0; b < BANDS; b++) reaching[i * BANDS + b]! *= through[code * BANDS + b]!
  }
}

function findMirroring({ samples, normal, sparkle }: SampleForm, flake: FlakeLevels, { tables, plain, aspecular }: Lighting, from: number, size: number, out: Mirroring): void {
  if (plain) {
    const { gain, cosine } = flakeGeometry(aspecular, flake.sigma)
    for (let i = 0; i < size; i++) setMirroring(out, i, gain, cosine)
    return
  }
  const { strength, local }: ReturnType<LightTables['flakes']> = tables.flakes(flake.sigma)
  for (let i = 0; i < size; i++) {
    const at = from + i
    const x = normal[3 * at]!, y = normal[3 * at + 1]!
    const glint = Math.max(GLINT_LEAST, 1 + flake.sparkle * sparkle[at]!) * samples.occlusion[at]!
    setMirroring(out, i, atNormal(strength, x, y) * glint, atNormal(local, x, y))
  }
}

function setMirroring({ strength, row, share }: Mirroring, i: number, gain: number, cosine: number): void {
  const place = Math.min(ROWS - 1, Math.max(0, (1 - cosine) / (1 - LOWEST_COSINE) * (ROWS - 1)))
  row[i] = Math.min(ROWS - 2, place)
  share[i] = place - row[i]!
  strength[i] = gain
}

function mirrorBlock(
  codes: Uint8Array, empty: number, { mirrored, diffuse }: FlakeLevels, from: number, size: number,
  { strength, row, share }: Mirroring, light: Float32Array, reaching: Float64Array, reflected: ArrayLike<number>, out: Float32Array,
): void {
  for (let i = 0; i < size; i++) {
    const code = codes[from + i]!
    if (code <= empty) continue
    const gain = strength[i]!, between = share[i]!, lit = light[from + i]!
    const here = (code * ROWS + row[i]!) * BANDS, even = code * BANDS, above = i * BANDS
    let red = 0, green = 0, blue = 0
    for (let b = 0; b < BANDS; b++) {
      const near = mirrored[here + b]!
      const seen = reaching[above + b]! * (gain * (near + between * (mirrored[here + BANDS + b]! - near)) - lit * diffuse[even + b]!)
      red += reflected[b]! * seen
      green += reflected[BANDS + b]! * seen
      blue += reflected[2 * BANDS + b]! * seen
    }
    const at = 3 * (from + i)
    out[at]! += red
    out[at + 1]! += green
    out[at + 2]! += blue
  }
}
