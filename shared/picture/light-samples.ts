import { clothRadiance, stripShare, type LightRig, type Strip } from './light-rig'

const DEGREE = Math.PI / 180
const GOLDEN = Math.PI * (3 - Math.sqrt(5))
/** Directions the cloth is sampled in; with 1000 a white furnace is white within 3e-4. */
const CLOTH_SAMPLES = 1000

/** A tent as a list of directions, each with the light it sends: radiance times solid angle over π. */
export interface LightSamples {
  count: number
  /** Unit directions, three each. */
  direction: Float64Array
  weight: Float64Array
}

/** Samples a tent: the cloth evenly over the sphere, every strip on a grid of its own. */
export function lightSamples(rig: LightRig): LightSamples {
  const direction: number[] = []
  const weight: number[] = []
  for (let i = 0; i < CLOTH_SAMPLES; i++) {
    const y = 1 - (2 * i + 1) / CLOTH_SAMPLES
    const r = Math.sqrt(1 - y * y)
    const x = r * Math.cos(GOLDEN * i), z = r * Math.sin(GOLDEN * i)
    direction.push(x, y, z)
    weight.push(clothRadiance(rig, x, y, z) * 4 / CLOTH_SAMPLES)
  }
  for (const strip of rig.strips) sampleStrip(strip, direction, weight)
  return { count: weight.length, direction: Float64Array.from(direction), weight: Float64Array.from(weight) }
}

function sampleStrip(strip: Strip, direction: number[], weight: number[]): void {
  const up = strip.halfHeight + strip.edge
  const along = Math.min(strip.halfWidth + strip.edge, 90 - Math.abs(strip.azimuth))
  const rows = Math.max(5, Math.round(up / 1.6)), columns = Math.max(5, Math.round(along / 2.6))
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const elevation = strip.elevation + up * (2 * (row + 0.5) / rows - 1)
      const azimuth = strip.azimuth + along * (2 * (column + 0.5) / columns - 1)
      const share = stripShare(strip, elevation, azimuth)
      if (share <= 0) continue
      const cosine = Math.cos(azimuth * DEGREE)
      direction.push(Math.sin(azimuth * DEGREE), cosine * Math.sin(elevation * DEGREE), cosine * Math.cos(elevation * DEGREE))
      const solidAngle = (2 * up * DEGREE / rows) * (2 * along * DEGREE / columns) * cosine
      weight.push(strip.radiance * share * solidAngle / Math.PI)
    }
  }
}

/** Irradiance of a surface that faces the viewer, before the gain; the gain is its inverse. */
export function facingIrradiance(samples: LightSamples): number {
  let sum = 0
  for (let i = 0; i < samples.count; i++) {
    const cosine = samples.direction[3 * i + 2]!
    if (cosine > 0) sum += cosine * samples.weight[i]!
  }
  return sum
}
