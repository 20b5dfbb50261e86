/** A whole number spread over all 32 bits, for any three whole numbers and a seed; equal in, equal out. */
export function hash3(x: number, y: number, z: number, seed: number): number {
  let h = Math.imul(x, 0x27d4eb2d) ^ Math.imul(y, 0x165667b1) ^ Math.imul(z, 0x9e3779b1) ^ seed
  h = Math.imul(h ^ (h >>> 15), 0x85ebca6b)
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35)
  return (h ^ (h >>> 16)) >>> 0
}

/** A whole number spread over all 32 bits, for two whole numbers and a seed. */
export function hash2(x: number, y: number, seed: number): number {
  let h = Math.imul(x, 0x27d4eb2d) ^ Math.imul(y, 0x165667b1) ^ seed
  h = Math.imul(h ^ (h >>> 15), 0x85ebca6b)
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35)
  return (h ^ (h >>> 16)) >>> 0
}

const TO_SHARE = 1 / 4294967296
const TO_SWING = 2 / 4294967296

/** A share in [0, 1) for two whole numbers and a seed. */
export const hashShare = (x: number, y: number, seed: number) => hash2(x, y, seed) * TO_SHARE

/** A seed from a name (a coat's or mask's id) and a whole number that tells its uses apart. FNV-1a, then spread. */
export function seedOf(name: string, use: number): number {
  let h = 0x811c9dc5
  for (let i = 0; i < name.length; i++) h = Math.imul(h ^ name.charCodeAt(i), 0x01000193)
  return hash2(h, use, 0x5bd1e995)
}

// ∫(1-s)² + s² over one step of the quintic s: how much interpolation calms a lattice of independent values.
const CALM = 2 * (36 / 11 + 225 / 9 + 100 / 7 - 180 / 10 + 120 / 9 - 300 / 8)
const LATTICE_VARIANCE = 1 / 3
const UNIT_2D = 1 / Math.sqrt(LATTICE_VARIANCE * CALM ** 2)
const UNIT_3D = 1 / Math.sqrt(LATTICE_VARIANCE * CALM ** 3)

/** Standard deviation of a noise that swings about ±1: amplitudes "±" a value are this much of unit noise. */
export const SWING = 0.4

/**
 * Smooth noise in the plane: values on a whole-number lattice, quintic in between. Mean 0, variance 1.
 * Differs for every seed; the same at the same place for ever.
 */
export function noise2(x: number, y: number, seed: number): number {
  const ix = Math.floor(x)
  const iy = Math.floor(y)
  const fx = x - ix
  const fy = y - iy
  const sx = fx * fx * fx * (fx * (fx * 6 - 15) + 10)
  const sy = fy * fy * fy * (fy * (fy * 6 - 15) + 10)
  const a = hash2(ix, iy, seed)
  const b = hash2(ix + 1, iy, seed)
  const c = hash2(ix, iy + 1, seed)
  const d = hash2(ix + 1, iy + 1, seed)
  const top = a + (b - a) * sx
  return ((top + (c + (d - c) * sx - top) * sy) * TO_SWING - 1) * UNIT_2D
}

const TEN_BITS = 1023
const TEN_TO_SWING = 2 / TEN_BITS

/**
 * Adds `weight` times three independent noises at once to `out`: one draw a corner of the lattice serves all three. Mean 0, and
 * variance 1 before the weight, in the plane.
 */
export function addThreeNoises(x: number, y: number, seed: number, weight: number, out: Float64Array): void {
  const ix = Math.floor(x)
  const iy = Math.floor(y)
  const fx = x - ix
  const fy = y - iy
  const sx = fx * fx * fx * (fx * (fx * 6 - 15) + 10)
  const sy = fy * fy * fy * (fy * (fy * 6 - 15) + 10)
  const a = hash2(ix, iy, seed)
  const b = hash2(ix + 1, iy, seed)
  const c = hash2(ix, iy + 1, seed)
  const d = hash2(ix + 1, iy + 1, seed)
  const wd = sx * sy
  const wb = sx - wd
  const wc = sy - wd
  const wa = 1 - sx - wc
  const gain = weight * UNIT_2D
  for (let k = 0; k < 3; k++) {
    const at = 10 * k
    const mixed = wa * (a >>> at & TEN_BITS) + wb * (b >>> at & TEN_BITS) + wc * (c >>> at & TEN_BITS) + wd * (d >>> at & TEN_BITS)
    out[k] = (out[k] ?? 0) + gain * (mixed * TEN_TO_SWING - 1)
  }
}

/** The same in space: three noises that go round a body without a seam. */
export function addThreeSpaceNoises(x: number, y: number, z: number, seed: number, weight: number, out: Float64Array): void {
  const iz = Math.floor(z)
  const fz = z - iz
  const sz = fz * fz * fz * (fz * (fz * 6 - 15) + 10)
  const gain = weight * UNIT_3D / UNIT_2D
  addThreeNoises(x, y, hash2(iz, 0x51ed27, seed), gain * (1 - sz), out)
  addThreeNoises(x, y, hash2(iz + 1, 0x51ed27, seed), gain * sz, out)
}

// 1/√(4·∫(1-s)²t²dt·∫(1-s)²dt): unit variance of gradient noise with unit gradients and the quintic.
const UNIT_GRADIENT = 1 / Math.sqrt(4 * gradientMoment() * CALM / 2)

function gradientMoment(): number {
  let sum = 0
  const steps = 2000
  for (let i = 0; i < steps; i++) {
    const t = (i + 0.5) / steps
    const s = t * t * t * (t * (t * 6 - 15) + 10)
    sum += (1 - s) * (1 - s) * t * t
  }
  return sum / steps
}

const DIRECTIONS = 256
const DIRECTION_X = Float64Array.from({ length: DIRECTIONS }, (_, i) => Math.cos(2 * Math.PI * i / DIRECTIONS))
const DIRECTION_Y = Float64Array.from({ length: DIRECTIONS }, (_, i) => Math.sin(2 * Math.PI * i / DIRECTIONS))

/** What `gradientNoise` hands back without making anything new: the value and its slopes along x and y. */
export interface Slope { value: number, dx: number, dy: number }

/** Gradient noise in the plane, mean 0, variance 1, with its slopes; smoother lines than lattice values give. */
export function gradientNoise(x: number, y: number, seed: number, out: Slope): void {
  const ix = Math.floor(x)
  const iy = Math.floor(y)
  const fx = x - ix
  const fy = y - iy
  const sx = fx * fx * fx * (fx * (fx * 6 - 15) + 10)
  const sy = fy * fy * fy * (fy * (fy * 6 - 15) + 10)
  const tx = 30 * fx * fx * (fx - 1) * (fx - 1)
  const ty = 30 * fy * fy * (fy - 1) * (fy - 1)
  let value = 0
  let dx = 0
  let dy = 0
  for (let corner = 0; corner < 4; corner++) {
    const cx = corner & 1
    const cy = corner >> 1
    const way = hash2(ix + cx, iy + cy, seed) & (DIRECTIONS - 1)
    const gx = DIRECTION_X[way] ?? 0
    const gy = DIRECTION_Y[way] ?? 0
    const along = gx * (fx - cx) + gy * (fy - cy)
    const wx = cx === 1 ? sx : 1 - sx
    const wy = cy === 1 ? sy : 1 - sy
    value += wx * wy * along
    dx += (cx === 1 ? tx : -tx) * wy * along + wx * wy * gx
    dy += (cy === 1 ? ty : -ty) * wx * along + wx * wy * gy
  }
  out.value = value * UNIT_GRADIENT
  out.dx = dx * UNIT_GRADIENT
  out.dy = dy * UNIT_GRADIENT
}

/** An empty slope to fill. */
export const newSlope = (): Slope => ({ value: 0, dx: 0, dy: 0 })

/** Gradient noise of several sizes, each half as large and half as strong as the one before; mean 0, variance 1. Uses `work`. */
export function fbm(x: number, y: number, octaves: number, seed: number, work: Slope): number {
  let sum = 0
  let energy = 0
  let strength = 1
  let px = x
  let py = y
  for (let octave = 0; octave < octaves; octave++) {
    gradientNoise(px, py, seed + octave * 0x632be5ab, work)
    sum += strength * work.value
    energy += strength * strength
    strength *= 0.5
    // Turned a little each time, so that no lattice shows through.
    const turned = 1.6 * px - 1.2 * py + 17.3
    py = 1.2 * px + 1.6 * py - 9.1
    px = turned
  }
  return sum / Math.sqrt(energy)
}
