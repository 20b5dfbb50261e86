import type { SurfaceTable } from '#shared/blank/surface-table'
import { evenly, type DepositKeep } from './keep'
import { hash2, hashShare, noise2, SWING } from './noise'
import { normalShare, smoothStep } from './normal-share'
import { cellAt, newCell, weaveOf, type Cell, type MeshForm } from './weave'

/** Cells never shrink below this share of the girth's, or a net would close at nose and tail. */
const LEAST_GIRTH = 0.16
/** Softness of a thread's shadow: lying on the paint, and per mm it stands off (spray opens by 13.5° to a side). mm. */
const SOFT = { tight: 0.03, perLift: 0.24 }
/** Seen at a grazing angle a net blurs, but its cells stay apart: a softer shadow would let more paint through. Share of the pitch. */
const BLUR_MOST = 0.1
/** How far a net gapes at belly and back, and lifts here and there, mm. Chosen by eye. */
const GAPE = { belly: 1.25, bellyFrom: 0.70, bellyTo: 0.95, back: 0.25, backFrom: 0.12, backTo: 0.02, here: 0.2 }
/** How far a hand pulls cells out of true, ± cells: in lanes of six cells and from cell to cell. */
const WARP = { lanes: 0.22 * SWING, laneSize: 6, cells: 0.11 * SWING, cellSize: 1.25 }
/** The other flank's net is not fitted like the first. Cells. */
const OTHER_SIDE = 0.37
/** Threads thicken where they cross, within this distance (at a pitch of 2 mm), and vary. */
const KNOT = { more: 0.45, reach: 0.1, atPitch: 2 }
const THREAD_VARIES = 0.3
/** Threads are pressed flat here and pulled thin there, over this many cells. */
const THREAD_OVER = 0.8
/** How much more or less paint single cells take, how it slants across a cell, and the lift, mm, at which cells run into each other. */
const CELL = { varies: 0.2, slant: 0.5, runsInto: 0.6 }

/**
 * How far a net lets spray through, 0 to 1, `edge` mm from the axis of a thread `width` mm thick whose shadow has a softness of
 * `soft` mm.
 */
export function besideThread(edge: number, width: number, soft: number): number {
  return 1 - (normalShare((edge + width / 2) / soft) - normalShare((edge - width / 2) / soft))
}

/** Thickness of a thread near a knot, mm; `nearest` and `second` are mm to the two nearest axes. */
export function knottedWidth(thread: number, pitch: number, nearest: number, second: number): number {
  const near = (second - nearest) / (KNOT.reach * pitch / KNOT.atPitch)
  return thread * (1 + (near < 4 ? KNOT.more * Math.exp(-near * near) : 0))
}

/** Relative size of cells at shares even in u, and how many pitches of a relaxed net lie before each on the widest line. */
function cellSizes(table: SurfaceTable, follow: number): { size: Float64Array, before: Float64Array } {
  const girth = table.halfGirthByU
  const most = girth.reduce((a, b) => Math.max(a, b), 0)
  const size = girth.map(one => Math.max(LEAST_GIRTH, one / most) ** follow)
  const before = new Float64Array(size.length)
  const step = table.widestLength / (size.length - 1)
  for (let i = 1; i < size.length; i++) before[i] = (before[i - 1] ?? 0) + step * (1 / (size[i - 1] ?? 1) + 1 / (size[i] ?? 1)) / 2
  return { size, before }
}

/**
 * A net as it was fitted once: what it lets through at every sample of the body. Around 1 in the middle of a cell (single cells
 * and their slant more or less), near 0 under a thread, washed out where the net gapes. Same mesh and seed, same map.
 */
export function meshMap(keep: DepositKeep, mesh: MeshForm, seed: number): Float32Array {
  const { table } = keep.blank
  const { samples: { U, V, u, v, side, count }, blur } = keep
  const out = new Float32Array(count).fill(1)
  const { size, before } = cellSizes(table, mesh.follow)
  const uMiddle = table.u[(table.u.length - 1) / 2] ?? 0.5
  const weave = weaveOf(mesh)
  const cell = newCell()
  const along = mesh.pitch * mesh.stretch
  for (const i of keep.onBody) {
    const isLeft = (side[i] ?? 1) > 0
    const own = isLeft ? seed : hash2(seed, 1, 0x3c6ef372)
    const share = u[i] ?? 0
    const f = evenly(size, share)
    const onWidest = (share - uMiddle) * table.widestLength
    let xi = (evenly(before, share) + ((U[i] ?? 0) - onWidest) / f) / along + (isLeft ? 0 : OTHER_SIDE)
    let eta = (V[i] ?? 0) / (mesh.pitch * f) + (isLeft ? 0 : OTHER_SIDE)
    const dx = WARP.lanes * noise2(xi / WARP.laneSize, eta / WARP.laneSize, own + 11) + WARP.cells * noise2(xi / WARP.cellSize, eta / WARP.cellSize, own + 12)
    eta += WARP.lanes * noise2(xi / WARP.laneSize, eta / WARP.laneSize, own + 13) + WARP.cells * noise2(xi / WARP.cellSize, eta / WARP.cellSize, own + 14)
    xi += dx
    cellAt(weave, xi, eta, cell)
    out[i] = throughNet(mesh, cell, mesh.pitch * f, v[i] ?? 0, xi, eta, own, blur[i] ?? 0)
  }
  return out
}

function throughNet(mesh: MeshForm, cell: Cell, pitch: number, v: number, xi: number, eta: number, seed: number, blur: number): number {
  const nearest = cell.nearest * pitch
  const here = noise2(xi / 4, eta / 4, seed + 15)
  const lift = mesh.lift
    + GAPE.belly * smoothStep(GAPE.bellyFrom, GAPE.bellyTo, v)
    + GAPE.back * smoothStep(GAPE.backFrom, GAPE.backTo, v)
    + GAPE.here * SWING * Math.max(0, here)
  const soft = Math.hypot(SOFT.tight + SOFT.perLift * lift, Math.min(blur, BLUR_MOST * pitch))
  const pulled = noise2(xi / THREAD_OVER, eta / THREAD_OVER, seed + 17)
  const width = knottedWidth(mesh.thread, pitch, nearest, cell.second * pitch) * (1 + THREAD_VARIES * SWING * pulled)
  const open = besideThread(nearest, width, soft)
  if (open <= 0) return 0
  // Where the net hangs off, what one cell takes runs into the next.
  const apart = 1 / (1 + (lift / CELL.runsInto) ** 2)
  const takes = 1 + apart * CELL.varies * (2 * hashShare(cell.column, cell.row, seed + 16) - 1)
  return open * takes * (1 + apart * CELL.slant * (0.6 * cell.y - 0.8 * cell.x))
}
