import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { halfGirth, TABLE_COLUMNS, TABLE_ROWS, type SurfaceTable } from '#shared/blank/surface-table'
import { PART_FIN, PART_NONE, type ViewSamples } from '#shared/blank/view-sample-lists'
import { gillEdge } from '#shared/blank/zones'
import { hashShare } from './noise'

/** How many maps of masks and of marks are kept for a view: those of one scheme, and some that are being tried. */
const MAPS_MAX = { masks: 24, marks: 40 }

/** Noise on the surface: of each kind three independent values a sample, side by side, that every coat mixes in its own way. */
export interface SurfaceNoise { hand: Float32Array, edge: Float32Array, droplets: Float32Array }

/** Stray drops of a view: which samples a drop touches, how much it lays there, and the draw that decides whether it fell. */
export interface Specks { sample: Uint32Array, weight: Float32Array, draw: Float32Array }

/** What is the same for every coat of one view. Make it once per list of samples; maps gather in it as coats are laid. */
export interface DepositKeep {
  readonly samples: ViewSamples
  readonly blank: PreparedBlank
  /** Half the girth beside each sample, mm. */
  readonly girth: Float32Array
  /** mm ahead of the back edge of the gill cover; negative behind it. */
  readonly ahead: Float32Array
  /** mm round the girth to the ridge of the back. */
  readonly toBack: Float32Array
  /** A share in [0, 1) for each sample, lying on the surface. */
  readonly dither: Float32Array
  /** Samples on the body, and samples on fins, in order. */
  readonly onBody: Uint32Array
  readonly onFins: Uint32Array
  /** mm of one pixel. */
  readonly pixel: number
  /** Reach of a sample beyond what it would cover of skin that faces the viewer, mm: what is finer blurs. */
  readonly blur: Float32Array
  /** Work space, one value per sample. */
  readonly deposit: Float32Array
  readonly zone: Float32Array
  readonly wideZone: Float32Array
  readonly maskMaps: Map<string, Float32Array>
  readonly markMaps: Map<string, Float32Array>
  noise: SurfaceNoise | null
  specks: Specks | null
}

/**
 * Prepares a list of samples of a prepared blank: a whole view, or a few pixels of it four times over.
 *
 * @param blur reach of each sample over skin that turns away, `grazingBlur` for a view; absent, samples lie straight on the skin
 */
export function depositKeep(samples: ViewSamples, blank: PreparedBlank, blur: Float32Array = new Float32Array(samples.count)): DepositKeep {
  const { count, part, u, v, U, V, side } = samples
  const { gill, length } = blank.shape
  const [girth, ahead, toBack, dither] = [0, 1, 2, 3].map(() => new Float32Array(count)) as [Float32Array, Float32Array, Float32Array, Float32Array] // four made above
  const [body, fins]: [number[], number[]] = [[], []]
  const back = backHeights(blank.table)
  for (let i = 0; i < count; i++) {
    const on = part[i] ?? PART_NONE
    const U_ = U[i] ?? 0
    const V_ = V[i] ?? 0
    dither[i] = hashShare(Math.floor(U_ * 50), Math.floor(V_ * 50) * 2 + ((side[i] ?? 1) > 0 ? 1 : 0), 0x2545f491)
    if (on === PART_NONE) continue
    if (on >= PART_FIN) {
      fins.push(i)
      continue
    }
    body.push(i)
    const u_ = u[i] ?? 0
    girth[i] = halfGirth(blank.table, u_)
    ahead[i] = (gillEdge(gill, v[i] ?? 0) - u_) * length
    toBack[i] = Math.max(0, evenly(back, u_) - V_)
  }
  return {
    samples, blank, girth, ahead, toBack, dither,
    onBody: Uint32Array.from(body), onFins: Uint32Array.from(fins),
    pixel: 1 / samples.view.scale, blur,
    deposit: new Float32Array(count), zone: new Float32Array(count), wideZone: new Float32Array(count),
    maskMaps: new Map(), markMaps: new Map(), noise: null, specks: null,
  }
}

/** Turned farther from the viewer than this, skin is a line: its blur grows no more. */
const GRAZING = 0.06

/** How far the samples of a view reach round skin that turns away from the viewer, beyond what they cover of a facing one, mm. */
export function grazingBlur({ normal, pixel, part, count, view }: ViewSamples): Float32Array {
  const out = new Float32Array(count)
  // Several samples of a pixel follow each other and share it.
  let each = 1
  while (each < count && pixel[each] === pixel[0]) each++
  const spread = 1 / (view.scale * Math.sqrt(12 * each))
  for (let i = 0; i < count; i++) if ((part[i] ?? 0) < PART_FIN) out[i] = spread * (1 / Math.max(GRAZING, normal[3 * i + 2] ?? 1) - 1)
  return out
}

/** V of the back ridge, mm, at places even in u. */
function backHeights(table: SurfaceTable): Float64Array {
  const out = new Float64Array(TABLE_ROWS)
  let row = 0
  for (let i = 0; i < TABLE_ROWS; i++) {
    const wanted = i / (TABLE_ROWS - 1)
    while (row < TABLE_ROWS - 2 && (table.u[row + 1] ?? 1) < wanted) row++
    const [a, b] = [table.u[row] ?? 0, table.u[row + 1] ?? 1]
    const f = Math.min(1, Math.max(0, (wanted - a) / (b - a)))
    out[i] = (table.V[row * TABLE_COLUMNS] ?? 0) * (1 - f) + (table.V[(row + 1) * TABLE_COLUMNS] ?? 0) * f
  }
  return out
}

/** Value at a share 0 to 1 of a table with even steps. */
export function evenly(table: ArrayLike<number>, share: number): number {
  const at = Math.min(1, Math.max(0, share)) * (table.length - 1)
  const i = Math.min(table.length - 2, Math.floor(at))
  const low = table[i] ?? 0
  return low + ((table[i + 1] ?? 0) - low) * (at - i)
}

/** A map of a mask or mark out of the keep, or made and kept; the one unused for longest makes room. */
export function keptMap(keep: DepositKeep, of: 'masks' | 'marks', key: string, make: () => Float32Array): Float32Array {
  const maps = of === 'masks' ? keep.maskMaps : keep.markMaps
  const map = maps.get(key) ?? make()
  maps.delete(key)
  maps.set(key, map)
  if (maps.size > MAPS_MAX[of]) {
    for (const oldest of maps.keys()) {
      maps.delete(oldest)
      break
    }
  }
  return map
}
