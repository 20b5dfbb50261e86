import { PART_FIN, PART_GAP, type ViewSamples } from '#shared/blank/view-sample-lists'
import type { Finish } from '#shared/optics/surface'
import { BANDS } from './coat-table'
import type { LaidTable } from './compose'
import type { SeenLight } from './engine/seen-daylight'
import { sampleLight, type SampleLight } from './engine/sample-light'
import { addFlakeLight } from './flake-light'
import { mirroredLight, type LightTables } from './light-tables'
import { fresnel } from './surface-lobes'
import { addGloss, tonePaint, tonePlain } from './tone'

/** How much of the tent's form the picture shows. Chosen by eye: colours stay near their promise, the body stays round. */
export const FORM = 0.85
/** Mirrored light of a matt film against the lobe worked out. Chosen by eye. */
export const MATT_SHARE = 0.62
const GLOSS_ON_FINS = 0.8
/** The rounded rim of a fin is too narrow to carry a highlight without breaking it into dots, mm. */
const RIM_WITHOUT_GLOSS = 0.8
/** Light that comes out of the open gap of a joint. */
export const GAP_LIGHT = 0.12

/** What is lit: the finished stack under every sample, and the coats in which flakes mirror. */
export interface LitStack {
  /** Reflectance inside the film, 16 per sample. */
  reflectance: Float32Array
  /** Linear light its coats give off where irradiance is 1, three per sample. */
  glow?: Float32Array | undefined
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
  /** The light it is seen by. */
  seen: SeenLight
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
export function paintLight(form: SampleForm, stack: LitStack, lighting: Lighting, sample: SampleLight = sampleLight(form, lighting)): Float32Array {
  const { count } = form.samples
  const out = new Float32Array(3 * count)
  for (let i = 0; i < count; i++) diffuseLight(stack.reflectance, i * BANDS, lighting.seen, sample.light[i]!, out, 3 * i)
  addFlakeLight(stack.coats, count, lighting.seen, sample, out)
  return finishLight(form, stack.glow, lighting, sample, out)
}

/** Adds to the light of the paint what it gives off and what the surface mirrors, and bends it for the screen. */
export function finishLight(form: SampleForm, glow: Float32Array | undefined, { plain, seen: { white } }: Lighting, { light, even, gloss }: SampleLight, out: Float32Array): Float32Array {
  const { samples: { count, part } } = form
  for (let i = 0; i < count; i++) {
    const at = 3 * i
    if (glow) for (let c = 0; c < 3; c++) out[at + c]! += glow[at + c]! * light[i]!
    if (even) for (let c = 0; c < 3; c++) out[at + c]! += white[c]! * even[i]!
    if (plain) tonePlain(out, at)
    else tonePaint(out, at)
    if (gloss) addGloss(out, at, gloss[i]!, white)
    if (part[i] === PART_GAP) for (let c = 0; c < 3; c++) out[at + c]! *= GAP_LIGHT
  }
  return out
}

function diffuseLight(reflectance: Float32Array, from: number, { reflected, surface: { outside, inside } }: SeenLight, light: number, out: Float32Array, at: number): void {
  let red = 0, green = 0, blue = 0
  for (let b = 0; b < BANDS; b++) {
    const r = reflectance[from + b]!
    const seen = r / (1 - inside * r)
    red += reflected[b]! * seen
    green += reflected[BANDS + b]! * seen
    blue += reflected[2 * BANDS + b]! * seen
  }
  const scale = (1 - outside) * (1 - inside) * light
  out[at] = scale * red
  out[at + 1] = scale * green
  out[at + 2] = scale * blue
}

/** White light the clear mirrors to the eye. */
export function glossLight(tables: LightTables, x: number, y: number, z: number): number {
  const facing = Math.max(0.02, z)
  return fresnel(facing) * mirroredLight(tables, 2 * facing * x, 2 * facing * y, 2 * facing * facing - 1)
}

/** Share of the gloss that a sample carries: less on fins, none on their rims. */
export function glossShare({ part, rim }: ViewSamples, i: number): number {
  return part[i]! >= PART_FIN ? GLOSS_ON_FINS * Math.min(1, rim[i]! / RIM_WITHOUT_GLOSS) ** 2 : 1
}

/** White light that the clear mirrors to the eye at one sample. */
export function glossAt({ samples, glossNormal }: SampleForm, i: number, tables: LightTables): number {
  return glossShare(samples, i) * glossLight(tables, glossNormal[3 * i]!, glossNormal[3 * i + 1]!, glossNormal[3 * i + 2]!)
}
