import { lightRig, tentRadiance, type LightRig } from './light-rig'
import { facingIrradiance, lightSamples, type LightSamples } from './light-samples'
import type { PictureLight } from './picture-options'
import { FILM_INDEX, flakeLobe, flakeSlope, mattLobe, type LobeReading } from './surface-lobes'

/** Places of a table in each direction, over the two sideways parts of the normal, -1 to 1. */
const GRID = 37

/** One value for each visible normal. */
export type NormalTable = Float32Array

/** What flakes of one spread send to the eye: strength, and the cosine at which light meets them. */
export interface FlakeTable { strength: NormalTable, local: NormalTable }

/** A light, tabulated: what a surface gets from the whole tent depends on its normal alone. */
export interface LightTables {
  rig: LightRig
  /** Scales radiances so that a surface facing the viewer gets exactly 1. */
  gain: number
  /** Irradiance of a surface. */
  irradiance: NormalTable
  /** Mirrored light of a matt film. */
  matt: () => NormalTable
  /** Flake lobe of a tilt spread, degrees, under a film of an index against what lies outside: air when left out. */
  flakes: (sigma: number, index?: number) => FlakeTable
}

/** Tabulates a light. Lobes are worked out when first asked for and kept. */
export function lightTables(light: PictureLight): LightTables {
  return tablesOf(lightRig(light))
}

/** Tabulates a tent. */
export function tablesOf(rig: LightRig): LightTables {
  const samples = lightSamples(rig)
  const gain = 1 / facingIrradiance(samples)
  const kept = new Map<string, FlakeTable>()
  let mattKept: NormalTable | undefined
  return {
    rig,
    gain,
    irradiance: overNormals(normal => gain * irradianceOf(samples, normal)),
    matt: () => mattKept ??= overNormals(normal => gain * mattOf(samples, normal)),
    flakes(sigma, index = FILM_INDEX) {
      const key = `${sigma} ${index}`
      const made = kept.get(key) ?? flakeTable(samples, gain, sigma, index)
      kept.set(key, made)
      return made
    },
  }
}

/** Radiance the eye meets in a mirrored direction, with the gain. */
export function mirroredLight(tables: LightTables, x: number, y: number, z: number): number {
  return tables.gain * tentRadiance(tables.rig, x, y, z)
}

type Normal = readonly [x: number, y: number, z: number]

function normalAt(row: number, column: number): Normal {
  const x = 2 * column / (GRID - 1) - 1, y = 2 * row / (GRID - 1) - 1
  const r2 = x * x + y * y
  if (r2 < 1) return [x, y, Math.sqrt(1 - r2)]
  const r = Math.sqrt(r2)
  return [x / r, y / r, 0]
}

function overNormals(value: (normal: Normal) => number): NormalTable {
  const table = new Float32Array(GRID * GRID)
  for (let row = 0; row < GRID; row++) {
    for (let column = 0; column < GRID; column++) table[row * GRID + column] = value(normalAt(row, column))
  }
  return table
}

function irradianceOf({ count, direction, weight }: LightSamples, [x, y, z]: Normal): number {
  let sum = 0
  for (let i = 0; i < count; i++) {
    const cosine = x * direction[3 * i]! + y * direction[3 * i + 1]! + z * direction[3 * i + 2]!
    if (cosine > 0) sum += cosine * weight[i]!
  }
  return sum
}

/** The eye's cosine is held off the limb, where a lobe would be a line. */
const LIMB = 0.06

function mattOf({ count, direction, weight }: LightSamples, [x, y, z]: Normal): number {
  const eye = Math.max(LIMB, z)
  let sum = 0
  for (let i = 0; i < count; i++) {
    const dz = direction[3 * i + 2]!
    const cosine = x * direction[3 * i]! + y * direction[3 * i + 1]! + z * dz
    if (cosine > 0) sum += cosine * weight[i]! * mattLobe(cosine, eye, dz)
  }
  return sum
}

function flakeTable({ count, direction, weight }: LightSamples, gain: number, sigma: number, index: number): FlakeTable {
  const slope = flakeSlope(sigma)
  const strength = new Float32Array(GRID * GRID), local = new Float32Array(GRID * GRID)
  const reading: LobeReading = { flake: 0, local: 1 }
  for (let at = 0; at < GRID * GRID; at++) {
    const [x, y, z] = normalAt(Math.floor(at / GRID), at % GRID)
    const eye = Math.max(LIMB, z)
    let sum = 0, angle = 0
    for (let i = 0; i < count; i++) {
      const dz = direction[3 * i + 2]!
      const cosine = x * direction[3 * i]! + y * direction[3 * i + 1]! + z * dz
      if (cosine <= 0) continue
      flakeLobe(cosine, eye, dz, slope, reading, index)
      const share = cosine * weight[i]! * reading.flake
      sum += share
      angle += share * reading.local
    }
    strength[at] = gain * sum
    local[at] = sum > 0 ? angle / sum : 1
  }
  return { strength, local }
}

/** Reads a table at a unit normal that faces the viewer. */
export function atNormal(table: NormalTable, x: number, y: number): number {
  const fx = (Math.min(1, Math.max(-1, x)) + 1) * ((GRID - 1) / 2), fy = (Math.min(1, Math.max(-1, y)) + 1) * ((GRID - 1) / 2)
  const column = Math.min(GRID - 2, fx | 0), row = Math.min(GRID - 2, fy | 0)
  const sx = fx - column, sy = fy - row
  const at = row * GRID + column
  const below = table[at]! + (table[at + 1]! - table[at]!) * sx
  const above = table[at + GRID]! + (table[at + GRID + 1]! - table[at + GRID]!) * sx
  return below + (above - below) * sy
}
