import type { MaskForm } from '#shared/scheme/mask'

export type MeshForm = Extract<MaskForm, { kind: 'mesh' }>

const ROOT3 = Math.sqrt(3)
const HALF_ROOT3 = ROOT3 / 2

/** How the threads of a net run in its own cell coordinates. Pitch is 1; x runs along the body, y round it, turned by the net's angle. */
export interface Weave {
  isHexagon: boolean
  /** Turn from the body's directions to the net's. */
  cos: number
  sin: number
  /** mm of way for one unit across each direction of thread, per pitch: 1 unless the net is stretched. */
  width: readonly [number, number, number]
}

/** Where a place lies in a net. Filled by `cellAt`. */
export interface Cell {
  /** Pitches to the axis of the nearest thread and of the second nearest; the stretch is taken off. */
  nearest: number
  second: number
  /** Place in the cell from its middle, in pitches, in the net's own directions. */
  x: number
  y: number
  /** Which cell. */
  column: number
  row: number
}

/** An empty cell to fill. */
export const newCell = (): Cell => ({ nearest: 0, second: 0, x: 0, y: 0, column: 0, row: 0 })

/** The weave of a net. A diamond is a square standing on its corner. */
export function weaveOf(mesh: Pick<MeshForm, 'weave' | 'angle' | 'stretch'>): Weave {
  const turn = (mesh.angle + (mesh.weave === 'diamond' ? 45 : 0)) * Math.PI / 180
  const cos = Math.cos(turn)
  const sin = Math.sin(turn)
  const across = (nx: number, ny: number) => 1 / Math.hypot((nx * cos - ny * sin) / mesh.stretch, nx * sin + ny * cos)
  const isHexagon = mesh.weave === 'hexagon'
  return {
    isHexagon, cos, sin,
    width: isHexagon
      ? [across(0, 1), across(HALF_ROOT3, 0.5), across(HALF_ROOT3, -0.5)]
      : [across(0, 1), across(1, 0), Infinity],
  }
}

/** Finds the cell of a place given in pitches along the body (xi) and round it (eta). */
export function cellAt(weave: Weave, xi: number, eta: number, out: Cell): void {
  const x = weave.cos * xi + weave.sin * eta
  const y = weave.cos * eta - weave.sin * xi
  if (weave.isHexagon) hexagonAt(weave, x, y, out)
  else squareAt(weave, x, y, out)
}

function squareAt(weave: Weave, x: number, y: number, out: Cell): void {
  out.column = Math.round(x)
  out.row = Math.round(y)
  out.x = x - out.column
  out.y = y - out.row
  const a = (0.5 - Math.abs(out.y)) * weave.width[0]
  const b = (0.5 - Math.abs(out.x)) * weave.width[1]
  out.nearest = Math.min(a, b)
  out.second = Math.max(a, b)
}

/** Columns stand √3/2 apart, every second one half a cell lower: two square-cornered lattices, the nearer middle wins. */
function hexagonAt(weave: Weave, x: number, y: number, out: Cell): void {
  const c0 = Math.round(x / ROOT3)
  const r0 = Math.round(y)
  const c1 = Math.round(x / ROOT3 - 0.5)
  const r1 = Math.round(y - 0.5)
  const x0 = x - c0 * ROOT3
  const y0 = y - r0
  const x1 = x - (c1 + 0.5) * ROOT3
  const y1 = y - r1 - 0.5
  const isFirst = x0 * x0 + y0 * y0 <= x1 * x1 + y1 * y1
  out.x = isFirst ? x0 : x1
  out.y = isFirst ? y0 : y1
  out.column = isFirst ? 2 * c0 : 2 * c1 + 1
  out.row = isFirst ? r0 : r1
  const a = (0.5 - Math.abs(out.y)) * weave.width[0]
  const b = (0.5 - Math.abs(HALF_ROOT3 * out.x + 0.5 * out.y)) * weave.width[1]
  const c = (0.5 - Math.abs(HALF_ROOT3 * out.x - 0.5 * out.y)) * weave.width[2]
  out.nearest = Math.min(a, b, c)
  out.second = a + b + c - out.nearest - Math.max(a, b, c)
}
