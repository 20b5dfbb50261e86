import type { FinOutline } from './fin-outline'
import { gapLight, jointDip, jointPlace, jointShade, jointTilt, type JointPlace } from './joint-place'
import type { PreparedBlank } from './prepared-blank'
import type { Section } from './profile'
import { reliefOf, reliefPlace, type Relief, type ReliefPlace } from './relief'
import { newSurfacePoint, surfacePoint, type SurfacePoint } from './surface-point'
import { fillSurfaceRow, newSurfaceRow, rowU, rowV, shareOfV, TABLE_COLUMNS, type SurfaceRow } from './surface-table'
import { viewTurn, type View, type ViewTurn } from './view'
import { fillViewColumn, newViewColumn, phiAtHeight, type ViewColumn } from './view-column'
import { PART_BODY, PART_GAP, type ViewSamples } from './view-sample-lists'

/** Share of the carved relief that still tilts the gloss: the clear fills the rest. */
const GLOSS_RELIEF = 0.16
const ROOT_SHADE = 0.3

/** What places of a body are written with: made once, moved from section to section by whoever writes. */
export interface BodyPen {
  blank: PreparedBlank
  /** Directions are written as they are seen after this turn. */
  turn: ViewTurn
  section: Section
  row: SurfaceRow
  point: SurfacePoint
  relief: Relief
  reliefPlace: ReliefPlace
  jointPlace: JointPlace
  /** How far along the body, mm, the section is from the nearest fin root on the back, and on the belly; 0 beside one. */
  toBackFin: number
  toBellyFin: number
}

/** What the samples of one view share; made once a view and filled column by column. */
export interface BodySampler extends BodyPen {
  view: View
  column: ViewColumn
}

/** Makes ready to write places of a body, section by section. */
export function newBodyPen(blank: PreparedBlank, turn: ViewTurn, section: Section): BodyPen {
  return {
    blank, turn, section, row: newSurfaceRow(), point: newSurfacePoint(),
    relief: reliefOf(blank),
    reliefPlace: { slopeTail: 0, slopeX: 0, slopeY: 0, light: 1 },
    jointPlace: { distance: Infinity, round: 1, towardX: 0, towardY: 0 },
    toBackFin: Infinity, toBellyFin: Infinity,
  }
}

/** Makes ready to sample the body in a view. */
export function newBodySampler(blank: PreparedBlank, view: View): BodySampler {
  const column = newViewColumn()
  return { ...newBodyPen(blank, viewTurn(view), column.section), view, column }
}

/** x on the body, mm from the nose, under a picture place `px` pixels from the left. */
export function xAtPixel(sampler: Pick<BodySampler, 'blank' | 'view' | 'turn'>, px: number): number {
  return sampler.blank.shape.length / 2 + sampler.turn.way * (px - sampler.view.centreX) / sampler.view.scale
}

/** Height in the rolled frame, mm, at a picture place `py` pixels from the top. */
export function heightAtPixel(sampler: Pick<BodySampler, 'view' | 'turn'>, py: number): number {
  return sampler.turn.way * (sampler.view.centreY - py) / sampler.view.scale
}

/** Goes to the column at x mm. @returns false beside the body */
export function goToColumn(sampler: BodySampler, x: number): boolean {
  const { blank, column } = sampler
  if (!fillViewColumn(blank.profile, sampler.turn, x, sampler.point, column)) return false
  goToSection(sampler)
  return true
}

/** Makes ready to write places of the pen's section, once that has been filled. */
export function goToSection(pen: BodyPen): void {
  const { blank, row, section: { t, x } } = pen
  fillSurfaceRow(blank.table, t, row)
  pen.toBackFin = Infinity
  pen.toBellyFin = Infinity
  for (let i = 0; i < blank.fins.length; i++) {
    const outline = blank.fins[i] as FinOutline // i runs over the list
    const measuredFrom = blank.shape.fins[i]?.measuredFrom
    if (measuredFrom === 'point') continue
    const away = Math.max(0, outline.rootLeft - x, x - outline.rootRight)
    if (measuredFrom === 'back') pen.toBackFin = Math.min(pen.toBackFin, away)
    else pen.toBellyFin = Math.min(pen.toBellyFin, away)
  }
}

/**
 * Writes sample i at a height of the rolled frame in the current column.
 * @returns how far inside the outline it lies, mm, after joints have drawn the outline in
 */
export function writeBodySample(sampler: BodySampler, height: number, samples: ViewSamples, i: number): number {
  const { column, jointPlace: joint } = sampler
  writeBodyAt(sampler, phiAtHeight(column, sampler.turn, height, sampler.point), samples, i)
  const inside = Math.min(column.high - height, height - column.low)
  return joint.distance < joint.round ? inside - jointDip(joint) : inside
}

/** Writes sample i at a girth angle of the pen's section, 0 on the back. The pen's joint place is then that of the sample. */
export function writeBodyAt(pen: BodyPen, angle: number, samples: ViewSamples, i: number): void {
  const { section, row, point, turn, blank } = pen
  const length = blank.shape.length
  surfacePoint(section, angle, point)
  const side = point.z >= 0 ? 1 : -1
  const turned = angle % (2 * Math.PI)
  const phi = turned <= Math.PI ? turned : 2 * Math.PI - turned
  const V = rowV(row, phi)
  const v = shareOfV(row, V)
  samples.U[i] = rowU(row, phi)
  samples.V[i] = V
  samples.u[i] = row.u
  samples.v[i] = v
  samples.side[i] = side
  samples.section[2 * i] = point.y - section.c
  samples.section[2 * i + 1] = point.z
  samples.bodyNormal[3 * i] = point.nx
  samples.bodyNormal[3 * i + 1] = point.ny
  samples.bodyNormal[3 * i + 2] = point.nz

  const relief = pen.reliefPlace
  reliefPlace(pen.relief, section.x, point.y, Math.abs(point.z), row.u, v, relief)
  let light = relief.light
  const reach = 1.1 * length / 100 + 0.3
  if (V > 0 && pen.toBackFin < 4 * reach) {
    light *= 1 - ROOT_SHADE * Math.exp(-Math.hypot(pen.toBackFin, (row.V[0] as number) - V) / reach)
  }
  else if (V < 0 && pen.toBellyFin < 4 * reach) {
    light *= 1 - ROOT_SHADE * Math.exp(-Math.hypot(pen.toBellyFin, V - (row.V[TABLE_COLUMNS - 1] as number)) / reach)
  }
  const joint = pen.jointPlace
  jointPlace(blank.shape.joints, section.x, point.y, joint)
  let tilt = 0
  samples.part[i] = PART_BODY
  if (joint.distance < joint.round) {
    tilt = jointTilt(joint)
    light *= 1 - jointShade(joint)
    if (joint.distance < 0) {
      samples.part[i] = PART_GAP
      light = gapLight(joint)
    }
  }
  samples.occlusion[i] = light

  // Rounded joint edges are part of the body's form; carving is filled by the clear.
  const jx = point.nx + tilt * joint.towardX
  const jy = point.ny + tilt * joint.towardY
  const along = 1 / Math.sqrt(section.xt * section.xt + point.yt * point.yt + point.zt * point.zt)
  const cx = relief.slopeTail * section.xt * along + relief.slopeX
  const cy = relief.slopeTail * point.yt * along + relief.slopeY
  const cz = relief.slopeTail * point.zt * along
  writeTurned(turn, jx + cx, jy + cy, point.nz + cz, samples.normal, i)
  writeTurned(turn, jx + GLOSS_RELIEF * cx, jy + GLOSS_RELIEF * cy, point.nz + GLOSS_RELIEF * cz, samples.glossNormal, i)
}

/** Writes a body direction as a unit vector of the view frame at place i of a list of triples. */
export function writeTurned(turn: ViewTurn, x: number, y: number, z: number, out: Float32Array, i: number): void {
  const size = 1 / Math.sqrt(x * x + y * y + z * z)
  out[3 * i] = turn.way * x * size
  out[3 * i + 1] = turn.way * (y * turn.cos - z * turn.sin) * size
  out[3 * i + 2] = (y * turn.sin + z * turn.cos) * size
}
