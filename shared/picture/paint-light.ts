import { PART_FIN, PART_GAP, type ViewSamples } from '#shared/blank/view-sample-lists'
import { flakeGeometry } from '#shared/optics/flake-angles'
import { FLAKE_TABLE_COSINES } from '#shared/optics/flake-table'
import { SURFACE_INSIDE, SURFACE_OUTSIDE, VEIL, type Finish } from '#shared/optics/surface'
import { PICTURE_LINEAR_WEIGHTS } from '#shared/optics/to-picture-bands'
import { BANDS, type FlakeLevels } from './coat-table'
import type { LaidTable } from './compose'
import { atNormal, mirroredLight, type LightTables } from './light-tables'
import { fresnel } from './surface-lobes'
import { addGloss, tonePaint, tonePlain } from './tone'

/** How much of the tent's form the picture shows. Chosen by eye: colours stay near their promise, the body stays round. */
const FORM = 0.85
/** Mirrored light of a matt film against the lobe worked out. Chosen by eye. */
const MATT_SHARE = 0.62
const GLOSS_ON_FINS = 0.8
/** The rounded rim of a fin is too narrow to carry a highlight without breaking it into dots, mm. */
const RIM_WITHOUT_GLOSS = 0.8
/** Light that comes out of the open gap of a joint. */
const GAP_LIGHT = 0.12
const GLINT_LEAST = 0.15
const THROUGH = (1 - SURFACE_OUTSIDE) * (1 - SURFACE_INSIDE)
const LOWEST_COSINE = FLAKE_TABLE_COSINES.at(-1)!
const ROWS = FLAKE_TABLE_COSINES.length

/** What is lit: the finished stack under every sample, and the coats in which flakes mirror. */
export interface LitStack {
  /** Reflectance inside the film, 16 per sample. */
  reflectance: Float32Array
  /** All coats shown, from the ground up. */
  coats: readonly LaidTable[]
}

/** How it is lit and finished. */
export interface Lighting {
  tables: LightTables
  finish: Finish
  /** Only the promised colours; `aspecular` is the angle flakes are read at, degrees. */
  plain: boolean
  aspecular: number
}

/** Directions and grain of the samples. */
export interface SampleForm {
  samples: ViewSamples
  /** Normals the paint is lit by and normals the gloss follows, three each. */
  normal: Float32Array
  glossNormal: Float32Array
  sparkle: Float32Array
}

/** Linear light of every sample, three each, as the screen will show it: paint toned, gloss on top. */
export function paintLight(form: SampleForm, stack: LitStack, lighting: Lighting, out = new Float32Array(3 * form.samples.count)): Float32Array {
  const { samples, normal } = form
  const { tables, finish, plain } = lighting
  const isGlossy = finish === 'gloss' && !plain
  const matt = plain || isGlossy ? undefined : tables.matt()
  const mattShare = MATT_SHARE * VEIL[finish] / VEIL.matt
  const veil = plain ? VEIL[finish] : 0
  const flakes = flakeLight(form, stack.coats, lighting)
  for (let i = 0; i < samples.count; i++) {
    const x = normal[3 * i]!, y = normal[3 * i + 1]!
    const occlusion = plain ? 1 : samples.occlusion[i]!
    const light = plain ? 1 : (1 + FORM * (atNormal(tables.irradiance, x, y) - 1)) * occlusion
    diffuseLight(stack.reflectance, i * BANDS, light, veil, out, 3 * i)
    flakes?.(i, light, out)
    if (matt) addEvenly(out, 3 * i, mattShare * atNormal(matt, x, y) * occlusion)
    if (plain) tonePlain(out, 3 * i)
    else tonePaint(out, 3 * i)
    if (isGlossy) addGloss(out, 3 * i, glossAt(form, i, tables))
    if (samples.part[i] === PART_GAP) for (let c = 0; c < 3; c++) out[3 * i + c]! *= GAP_LIGHT
  }
  return out
}

function diffuseLight(reflectance: Float32Array, from: number, light: number, veil: number, out: Float32Array, at: number): void {
  let red = 0, green = 0, blue = 0
  for (let b = 0; b < BANDS; b++) {
    const r = reflectance[from + b]!
    const seen = r / (1 - SURFACE_INSIDE * r)
    red += PICTURE_LINEAR_WEIGHTS[b]! * seen
    green += PICTURE_LINEAR_WEIGHTS[BANDS + b]! * seen
    blue += PICTURE_LINEAR_WEIGHTS[2 * BANDS + b]! * seen
  }
  const scale = THROUGH * light
  out[at] = scale * red + veil
  out[at + 1] = scale * green + veil
  out[at + 2] = scale * blue + veil
}

function addEvenly(out: Float32Array, at: number, light: number): void {
  for (let c = 0; c < 3; c++) out[at + c]! += light
}

/** White light the clear mirrors to the eye. */
export function glossLight(tables: LightTables, x: number, y: number, z: number): number {
  const facing = Math.max(0.02, z)
  return fresnel(facing) * mirroredLight(tables, 2 * facing * x, 2 * facing * y, 2 * facing * facing - 1)
}

function glossAt({ samples, glossNormal }: SampleForm, i: number, tables: LightTables): number {
  const share = samples.part[i]! >= PART_FIN ? GLOSS_ON_FINS * Math.min(1, samples.rim[i]! / RIM_WITHOUT_GLOSS) ** 2 : 1
  return share * glossLight(tables, glossNormal[3 * i]!, glossNormal[3 * i + 1]!, glossNormal[3 * i + 2]!)
}

/** A coat of flakes with how the light at hand is thrown by it. */
interface FlakeCoat {
  codes: Uint8Array
  levels: FlakeLevels
  at: (x: number, y: number) => { strength: number, cosine: number }
}

/**
 * Adds what flakes mirror, from the top coat down; undefined when no coat has any.
 *
 * A lamp lights flakes where they lie, so their light is moved from all sides to where they mirror it to the eye.
 */
function flakeLight({ normal, sparkle, samples }: SampleForm, coats: readonly LaidTable[], lighting: Lighting): ((i: number, light: number, out: Float32Array) => void) | undefined {
  const lowest = coats.findIndex(({ table }) => table.flake)
  if (lowest < 0) return undefined
  const down = coats.slice(lowest).reverse().map(({ codes, table }) => ({ codes, table, flake: table.flake && flakeCoat(codes, table.flake, lighting) }))
  const reaching = new Float64Array(BANDS)
  const light3 = [0, 0, 0]

  return (i, light, out) => {
    reaching.fill(1)
    light3.fill(0)
    for (const { codes, table, flake } of down) {
      const code = codes[i]!
      if (code <= table.empty) continue
      if (flake) {
        const { strength, cosine } = flake.at(normal[3 * i]!, normal[3 * i + 1]!)
        const glint = lighting.plain ? 1 : Math.max(GLINT_LEAST, 1 + flake.levels.sparkle * sparkle[i]!) * samples.occlusion[i]!
        mirrorInto(flake.levels, code, strength * glint, cosine, light, reaching, light3)
      }
      const from = code * BANDS
      for (let b = 0; b < BANDS; b++) reaching[b]! *= table.through[from + b]!
    }
    for (let c = 0; c < 3; c++) out[3 * i + c]! += light3[c]!
  }
}

function mirrorInto({ mirrored, diffuse }: FlakeLevels, code: number, strength: number, cosine: number, light: number, reaching: Float64Array, sum: number[]): void {
  const place = Math.min(ROWS - 1.0001, Math.max(0, (1 - cosine) / (1 - LOWEST_COSINE) * (ROWS - 1)))
  const row = place | 0, share = place - row
  const at = (code * ROWS + row) * BANDS
  let red = 0, green = 0, blue = 0
  for (let b = 0; b < BANDS; b++) {
    const here = mirrored[at + b]!
    const lit = strength * (here + share * (mirrored[at + BANDS + b]! - here)) - light * diffuse[code * BANDS + b]!
    const seen = reaching[b]! * lit
    red += PICTURE_LINEAR_WEIGHTS[b]! * seen
    green += PICTURE_LINEAR_WEIGHTS[BANDS + b]! * seen
    blue += PICTURE_LINEAR_WEIGHTS[2 * BANDS + b]! * seen
  }
  sum[0]! += red
  sum[1]! += green
  sum[2]! += blue
}

function flakeCoat(codes: Uint8Array, levels: FlakeLevels, { tables, plain, aspecular }: Lighting): FlakeCoat {
  const reading = { strength: 0, cosine: 1 }
  if (plain) {
    const { gain, cosine } = flakeGeometry(aspecular, levels.sigma)
    reading.strength = gain
    reading.cosine = cosine
    return { codes, levels, at: () => reading }
  }
  const { strength, local } = tables.flakes(levels.sigma)
  return {
    codes, levels,
    at(x, y) {
      reading.strength = atNormal(strength, x, y)
      reading.cosine = atNormal(local, x, y)
      return reading
    },
  }
}
