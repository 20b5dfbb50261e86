import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { PART_BODY, type ViewSamples } from '#shared/blank/view-sample-lists'
import { drawnParts, type DrawnEye, type DrawnParts } from '#shared/blank/draw-parts'
import type { View } from '#shared/blank/view'
import type { CoatTable } from './coat-table'
import type { LaidTable } from './compose'
import { depositKeep, grazingBlur, type DepositKeep } from './deposit/keep'
import { depositMap, type DepositMap } from './deposit-map'
import type { SampleForm } from './paint-light'
import type { ShownCoat } from './shown-coats'
import { sparkleNoise, wavyNormals } from './surface-grain'

/** How many deposits a view keeps beyond those it shows. */
const SPARE_MAPS = 24

/** Everything that stands as long as a blank is looked at from the same side: samples, grain, deposits. */
export interface ViewKit {
  samples: ViewSamples
  parts: DrawnParts
  form: SampleForm
  /** The same with blind eyes: domes under the paint. */
  blindForm: SampleForm
  keep: DepositKeep
  maps: Map<string, DepositMap>
}

/** Prepares a view for drawing. */
export function viewKit(blank: PreparedBlank, view: View, samples: ViewSamples): ViewKit {
  const parts = drawnParts(blank, view)
  const form: SampleForm = { samples, normal: samples.normal, glossNormal: wavyNormals(samples), sparkle: sparkleNoise(samples) }
  const blindForm = { ...form, normal: domed(samples, parts.eyes, samples.normal), glossNormal: domed(samples, parts.eyes, form.glossNormal) }
  return { samples, parts, form, blindForm, keep: depositKeep(samples, blank, grazingBlur(samples)), maps: new Map() }
}

/** Normals with the domes of the eyes standing out of the flank. */
function domed(samples: ViewSamples, eyes: readonly DrawnEye[], normals: Float32Array): Float32Array {
  const out = normals.slice()
  const { width } = samples.view
  for (const { centre, inverse: [i00, i01, i10, i11], facing, toTail, up } of eyes) {
    for (let i = 0; i < samples.count; i++) {
      if (samples.part[i] !== PART_BODY) continue
      const pixel = samples.pixel[i]!
      const dx = pixel % width + 0.5 - centre[0], dy = Math.floor(pixel / width) + 0.5 - centre[1]
      const a = i00 * dx + i01 * dy, b = i10 * dx + i11 * dy
      const q = Math.hypot(a, b)
      if (q >= 1) continue
      const lean = 0.55 + 0.3 * q ** 5
      const dome = [0, 1, 2].map(c => facing[c]! + lean * (a * toTail[c]! + b * up[c]!)) as [number, number, number] // three by the list
      const size = Math.hypot(...dome)
      for (let c = 0; c < 3; c++) out[3 * i + c] = dome[c]! / size
    }
  }
  return out
}

/** Where a coat lies in this view; worked out once for as long as its place stands. */
export function keptMap(kit: ViewKit, coat: ShownCoat): DepositMap {
  const found = kit.maps.get(coat.placeKey)
  const map = found ?? depositMap(kit.keep, coat.laid)
  // Set anew, so that the oldest in the list is the one unused for longest.
  kit.maps.delete(coat.placeKey)
  kit.maps.set(coat.placeKey, map)
  return map
}

/** Forgets deposits that have not been shown for long. */
export function tidyMaps(kit: ViewKit, shown: number): void {
  const spare = kit.maps.size - shown - SPARE_MAPS
  if (spare <= 0) return
  for (const key of [...kit.maps.keys()].slice(0, spare)) kit.maps.delete(key)
}

/** A coat with its table, and a text that says all of it. */
export interface KeyedCoat extends LaidTable {
  key: string
  table: CoatTable
}
