import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { PART_BODY, type ViewSamples } from '#shared/blank/view-sample-lists'
import { drawnParts, type DrawnEye, type DrawnParts } from '#shared/blank/draw-parts'
import type { View } from '#shared/blank/view'
import type { CoatTable } from './coat-table'
import { bareGround, layCoats, type LaidTable } from './compose'
import { depositKeep, type DepositKeep } from './deposit/keep'
import { depositMap, type DepositMap } from './deposit-map'
import { glowLight } from './glow-light'
import type { SampleForm } from './paint-light'
import type { ShownCoat } from './shown-coats'
import { sparkleNoise, wavyNormals } from './surface-grain'

/** How many deposits a view keeps beyond those it shows. */
const SPARE_MAPS = 24

interface KeptGlow { groundKey: string, coats: readonly KeyedCoat[], light: Float32Array | undefined }
interface KeptState { keys: readonly string[], state: Float32Array }

/** Everything that stands as long as a blank is looked at from the same side: samples, grain, deposits, coats below the edit. */
export interface ViewKit {
  samples: ViewSamples
  parts: DrawnParts
  form: SampleForm
  /** The same with blind eyes: domes under the paint. */
  blindForm: SampleForm
  keep: DepositKeep
  maps: Map<string, DepositMap>
  prefix: KeptState | undefined
  whole: KeptState | undefined
  glow: KeptGlow | undefined
}

/** Prepares a view for drawing. */
export function viewKit(blank: PreparedBlank, view: View, samples: ViewSamples): ViewKit {
  const parts = drawnParts(blank, view)
  const form: SampleForm = { samples, normal: samples.normal, glossNormal: wavyNormals(samples), sparkle: sparkleNoise(samples) }
  const blindForm = { ...form, normal: domed(samples, parts.eyes, samples.normal), glossNormal: domed(samples, parts.eyes, form.glossNormal) }
  return { samples, parts, form, blindForm, keep: depositKeep(samples, blank), maps: new Map(), prefix: undefined, whole: undefined, glow: undefined }
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

/**
 * Reflectance of the stack under every sample. Starts from the coats that have not changed since last time, and keeps
 * what lies below the first that has: the next change is most likely to the same coat.
 */
export function composeKept(kit: ViewKit, groundKey: string, ground: ArrayLike<number>, coats: readonly KeyedCoat[]): Float32Array {
  const keys = [groundKey, ...coats.map(coat => coat.key)]
  const last = kit.whole
  const alike = last ? sharedStart(last.keys, keys) : 0
  if (last && alike === keys.length && alike === last.keys.length) return last.state

  const starts = [last, kit.prefix].filter((kept): kept is KeptState => kept !== undefined && sharedStart(kept.keys, keys) === kept.keys.length)
  let from = starts.reduce<KeptState | undefined>((best, kept) => !best || kept.keys.length > best.keys.length ? kept : best, undefined)
    ?? { keys: [groundKey], state: bareGround(kit.samples.count, ground) }
  if (alike > from.keys.length) {
    from = { keys: keys.slice(0, alike), state: layCoats(coats.slice(from.keys.length - 1, alike - 1), from.state) }
  }
  // The old whole has had its day, unless it is what the new one starts from.
  const spare = last && last !== from ? last.state : undefined
  kit.prefix = from
  kit.whole = { keys, state: layCoats(coats.slice(from.keys.length - 1), from.state, spare) }
  return kit.whole.state
}

/** Light that the stack gives off under every sample; worked out anew only where a coat lies that has changed since last time. */
export function keptGlow(kit: ViewKit, groundKey: string, ground: ArrayLike<number>, coats: readonly KeyedCoat[]): Float32Array | undefined {
  const last = kit.glow?.groundKey === groundKey ? kit.glow : undefined
  const changed = last && changedCoats(last.coats, coats)
  if (last && changed?.length === 0) return last.light
  const light = glowLight(coats, ground, kit.samples.count, last?.light && changed && { light: last.light, changed })
  kit.glow = { groundKey, coats, light }
  return light
}

/** What lies between the coats at the bottom and at the top that two stacks share, of both. */
function changedCoats(before: readonly KeyedCoat[], now: readonly KeyedCoat[]): KeyedCoat[] {
  const [a, b] = [before, now].map(coats => coats.map(coat => coat.key)) as [string[], string[]]
  const low = sharedStart(a, b)
  const high = sharedStart(a.slice(low).reverse(), b.slice(low).reverse())
  return [...before.slice(low, a.length - high), ...now.slice(low, b.length - high)]
}

function sharedStart(a: readonly string[], b: readonly string[]): number {
  let count = 0
  while (count < a.length && count < b.length && a[count] === b[count]) count++
  return count
}
