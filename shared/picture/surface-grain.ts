import type { ViewSamples } from '#shared/blank/view-sample-lists'
import { hashShare, noise2 } from './deposit/noise'

/**
 * A clear is never ruled: its surface tilts by so much, radians rms, in waves of these lengths along and round the body, mm. It
 * levels while it turns, so waves are long; short ones would kink the highlight like a drawn line. Chosen by eye.
 */
const WAVE_TILT = 0.021
const WAVES = [{ along: 15, round: 9, share: 0.93 }, { along: 5, round: 4, share: 0.36 }] as const
/** Cells of the sparkle of flakes, mm, and their shares. */
const SPARKLE_CELLS = [{ size: 0.085, share: 0.75 }, { size: 0.2, share: 0.7 }] as const
/** Most flakes lie a little dark and a few flash: a glint is so many spreads at most. */
const GLINT_MOST = 4
/** Flakes drift into clouds while a coat is wet: their size, mm, and share. */
const CLOUDS = { size: 1.1, share: 0.5 }
/** Mean of an exponential spread cut off at the brightest glint. */
const GLINT_MEAN = 1 - Math.exp(-GLINT_MOST)
/** Pixel size, mm, up to which sparkle is seen whole; above it averages away. */
const SPARKLE_PIXEL = 0.12

/** Unit normals the gloss follows, with the waviness of a hand-turned clear. Three each; noise sits on the surface. */
export function wavyNormals(samples: ViewSamples): Float32Array {
  const out = new Float32Array(3 * samples.count)
  for (let i = 0; i < samples.count; i++) {
    const seed = samples.side[i]! + 3
    let tiltX = 0, tiltY = 0
    for (const { along, round, share } of WAVES) {
      const x = samples.U[i]! / along, y = samples.V[i]! / round
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

/** How flakes glint over the surface: noise of mean 0 in tiny cells, already weakened for large pixels, and clouds. */
export function sparkleNoise(samples: ViewSamples): Float32Array {
  const seen = Math.min(1, SPARKLE_PIXEL * samples.view.scale)
  const out = new Float32Array(samples.count)
  for (let i = 0; i < samples.count; i++) {
    const seed = samples.side[i]! + 41
    let sum = 0
    for (const { size, share } of SPARKLE_CELLS) {
      const column = Math.floor(samples.U[i]! / size), row = Math.floor(samples.V[i]! / size)
      sum += share * (Math.min(GLINT_MOST, -Math.log(1 - hashShare(column, row, seed))) - GLINT_MEAN)
    }
    out[i] = seen * sum + CLOUDS.share * noise2(samples.U[i]! / CLOUDS.size, samples.V[i]! / CLOUDS.size, seed + 7)
  }
  return out
}
