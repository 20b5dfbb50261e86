import { PART_FIN, PART_GAP, type ViewSamples } from '#shared/blank/view-sample-lists'
import { VEIL, type Finish } from '#shared/optics/surface'
import { BANDS } from './coat-table'
import type { LaidTable } from './compose'
import type { SeenLight } from './engine/seen-daylight'
import { addFlakeLight } from './flake-light'
import { atNormal, mirroredLight, type LightTables } from './light-tables'
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
export function paintLight(form: SampleForm, stack: LitStack, lighting: Lighting, out = new Float32Array(3 * form.samples.count)): Float32Array {
  const { samples, normal } = form
  const { tables, finish, plain, seen } = lighting
  const isGlossy = finish === 'gloss' && !plain
  const matt = plain || isGlossy ? undefined : tables.matt()
  const mattShare = MATT_SHARE * VEIL[finish] / VEIL.matt
  const veil = plain ? VEIL[finish] : 0
  const light = lightOnSamples(form, lighting)
  for (let i = 0; i < samples.count; i++) diffuseLight(stack.reflectance, i * BANDS, seen, light[i]!, veil, out, 3 * i)
  if (stack.glow) for (let i = 0; i < out.length; i++) out[i]! += stack.glow[i]! * light[Math.floor(i / 3)]!
  addFlakeLight(form, stack.coats, lighting, light, out)
  for (let i = 0; i < samples.count; i++) {
    if (matt) addEvenly(out, 3 * i, mattShare * atNormal(matt, normal[3 * i]!, normal[3 * i + 1]!) * samples.occlusion[i]!)
    if (plain) tonePlain(out, 3 * i)
    else tonePaint(out, 3 * i)
    if (isGlossy) addGloss(out, 3 * i, glossAt(form, i, tables))
    if (samples.part[i] === PART_GAP) for (let c = 0; c < 3; c++) out[3 * i + c]! *= GAP_LIGHT
  }
  return out
}

/** Light that falls on the paint of every sample from all of the tent. */
function lightOnSamples({ samples, normal }: SampleForm, { tables, plain }: Lighting): Float32Array {
  const light = new Float32Array(samples.count)
  if (plain) return light.fill(1)
  for (let i = 0; i < samples.count; i++) {
    const irradiance = atNormal(tables.irradiance, normal[3 * i]!, normal[3 * i + 1]!)
    light[i] = (1 + FORM * (irradiance - 1)) * samples.occlusion[i]!
  }
  return light
}

function diffuseLight(reflectance: Float32Array, from: number, { reflected, surface: { outside, inside } }: SeenLight, light: number, veil: number, out: Float32Array, at: number): void {
  let red = 0, green = 0, blue = 0
  for (let b = 0; b < BANDS; b++) {
    const r = reflectance[from + b]!
    const seen = r / (1 - inside * r)
    red += reflected[b]! * seen
    green += reflected[BANDS + b]! * seen
    blue += reflected[2 * BANDS + b]! * seen
  }
  const scale = (1 - outside) * (1 - inside) * light
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

/** Share of the gloss that a sample carries: less on fins, none on their rims. */
export function glossShare({ part, rim }: ViewSamples, i: number): number {
  return part[i]! >= PART_FIN ? GLOSS_ON_FINS * Math.min(1, rim[i]! / RIM_WITHOUT_GLOSS) ** 2 : 1
}

function glossAt({ samples, glossNormal }: SampleForm, i: number, tables: LightTables): number {
  return glossShare(samples, i) * glossLight(tables, glossNormal[3 * i]!, glossNormal[3 * i + 1]!, glossNormal[3 * i + 2]!)
}
