import { PART_GAP, type ViewSamples } from '#shared/blank/view-sample-lists'
import { GAP_LIGHT, glossShare } from '../paint-light'
import { wavyNormals } from '../surface-grain'
import type { HalfSheet } from './paint-sheet'
import { toHalf } from './half-float'

/** The form of a sheet, texel by texel, in the directions of the body. */
export interface FormSheet {
  /** Normal the paint is lit by, and light kept beside grooves and roots. */
  paint: HalfSheet
  /** Normal the gloss follows, with the waves of the clear, and the share of the gloss there is. */
  gloss: HalfSheet
}

/** Forms a sheet of samples whose directions are those of the body. */
export function formSheet(samples: ViewSamples): FormSheet {
  const { count, normal, glossNormal, occlusion, part } = samples
  const paint = new Uint16Array(4 * count), gloss = new Uint16Array(4 * count)
  const waves = wavesOf(samples)
  for (let i = 0; i < count; i++) {
    const at = 4 * i, n = 3 * i
    for (let c = 0; c < 3; c++) paint[at + c] = toHalf(normal[n + c]!)
    paint[at + 3] = toHalf(part[i] === PART_GAP ? GAP_LIGHT * occlusion[i]! : occlusion[i]!)
    const calm = fromRidge(samples.v[i]!)
    const [x, y, z] = tilted(glossNormal[n]!, glossNormal[n + 1]!, glossNormal[n + 2]!, calm * waves[n]!, calm * waves[n + 1]!)
    gloss[at] = toHalf(x)
    gloss[at + 1] = toHalf(y)
    gloss[at + 2] = toHalf(z)
    gloss[at + 3] = toHalf(glossShare(samples, i))
  }
  return { paint, gloss }
}

/** The waves of the two flanks are strangers: where they meet, along back and belly, the clear lies smooth. Share of the half girth. */
const CALM = 0.06

function fromRidge(v: number): number {
  const f = Math.min(1, Math.min(v, 1 - v) / CALM)
  return f * f * (3 - 2 * f)
}

/** Waves of the clear on a surface that looks straight up: how far it tilts along the body and round it. */
function wavesOf(samples: ViewSamples): Float32Array {
  const upright = new Float32Array(3 * samples.count)
  for (let i = 0; i < samples.count; i++) upright[3 * i + 2] = 1
  return wavyNormals({ ...samples, glossNormal: upright })
}

/** A unit normal tilted along the body and round it, in the plane it stands on. */
function tilted(x: number, y: number, z: number, along: number, round: number): [x: number, y: number, z: number] {
  // Along: the body's axis laid into the surface. Round: a quarter turn from it, upward on both flanks.
  const lean = Math.sqrt(Math.max(1e-6, 1 - x * x))
  const side = z < 0 ? -1 : 1
  const out: [number, number, number] = [
    x + along * lean,
    y - along * x * y / lean + round * side * z / lean,
    z - along * x * z / lean - round * side * y / lean,
  ]
  const size = Math.hypot(...out)
  return [out[0] / size, out[1] / size, out[2] / size]
}
