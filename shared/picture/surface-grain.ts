import type { ViewSamples } from '#shared/blank/view-sample-lists'
import { hashShare, noise2 } from './deposit/noise'

/** A clear is never ruled: its surface tilts by so much, radians rms, in waves of these lengths, mm. Chosen by eye. */
const WAVE_TILT = 0.02
const WAVES = [{ length: 8, share: 0.88 }, { length: 2.6, share: 0.47 }] as const
/** Cells of the sparkle of flakes, mm, and their shares. */
const SPARKLE_CELLS = [{ size: 0.085, share: 1 }, { size: 0.2, share: 0.7 }] as const
/** Pixel size, mm, up to which sparkle is seen whole; above it averages away. */
const SPARKLE_PIXEL = 0.12

/** Unit normals the gloss follows, with the waviness of a hand-turned clear. Three each; noise sits on the surface. */
export function wavyNormals(samples: ViewSamples): Float32Array {
  const out = new Float32Array(3 * samples.count)
  for (let i = 0; i < samples.count; i++) {
    const seed = samples.side[i]! + 3
    let tiltX = 0, tiltY = 0
    for (const { length, share } of WAVES) {
      const x = samples.U[i]! / length, y = samples.V[i]! / length
      tiltX += share * noise2(x, y, seed)
      tiltY += share * noise2(x, y, seed + 17)
    }
    const x = samples.glossNormal[3 * i]! + WAVE_TILT * tiltX
    const y = samples.glossNormal[3 * i + 1]! + WAVE_TILT * tiltY
    const z = samples.glossNormal[3 * i + 2]!
    const scale = 1 / Math.hypot(x, y, z)
    out[3 * i] = x * scale
    out[3 * i + 1] = y * scale
    out[3 * i + 2] = z * scale
  }
  return out
}

/** How flakes glint over the surface: unit noise in tiny cells, already weakened for large pixels. */
export function sparkleNoise(samples: ViewSamples): Float32Array {
  const seen = Math.min(1, SPARKLE_PIXEL * samples.view.scale)
  const out = new Float32Array(samples.count)
  for (let i = 0; i < samples.count; i++) {
    const seed = samples.side[i]! + 41
    let sum = 0
    for (const { size, share } of SPARKLE_CELLS) {
      const column = Math.floor(samples.U[i]! / size), row = Math.floor(samples.V[i]! / size)
      sum += share * (hashShare(column, row, seed) + hashShare(column, row, seed + 7) - 1) * 2.45
    }
    out[i] = seen * sum
  }
  return out
}
