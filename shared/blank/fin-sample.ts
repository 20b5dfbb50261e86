import { writeTurned, type BodySampler } from './body-sample'
import { finPlace, rayAngle, rootToTip, type FinOutline, type FinPlace } from './fin-outline'
import { newSection, tOfShare, type Section } from './profile'
import { TABLE_ROWS } from './surface-table'
import { PART_FIN, type ViewSamples } from './view-sample-lists'

/** Width of the rounded rim of a fin, mm. */
export const RIM_ROUND_MM = 0.6
/** Share of the ray slopes that still tilts the gloss: more would break it into dashes. */
export const GLOSS_RAYS = 0.3
/** Share of the rim's rounding that still tilts the gloss: more would thread a dotted highlight along it. */
export const GLOSS_RIM = 0.3
const ROOT_DARKER = 0.28
const ROOT_SHADE = 0.3

/** Below this share of its height a fin is seen edge on and not drawn. */
export const FIN_EDGE_ON = 0.02

/** Room for one fin place while sampling. */
export interface FinScratch {
  place: FinPlace
  section: Section
}

/** Room for sampling fins. */
export function newFinScratch(): FinScratch {
  return { place: { rim: 0, rimX: 0, rimY: 0 }, section: newSection() }
}

/** Distance to the rim of a fin, mm, + inside, at (x, y) body mm; leaves the place in `scratch`. Far outside its box: -Infinity. */
export function rimDistance(fin: FinOutline, x: number, y: number, reach: number, scratch: FinScratch): number {
  if (x < fin.left - reach || x > fin.right + reach || y < fin.low - reach || y > fin.high + reach) return -Infinity
  finPlace(fin, x, y, scratch.place)
  return scratch.place.rim
}

function slopeAcrossRays(fin: FinOutline, angle: number): number {
  if (fin.raysPerRadian === 0) return 0
  const k = (angle - fin.firstRay) * fin.raysPerRadian
  return 0.3 * Math.sin(2 * Math.PI * k) + 0.1 * Math.sin(4 * Math.PI * k)
}

/** Writes sample i on fin `index` at (x, y) body mm, with the place `rimDistance` left behind. */
export function writeFinSample(
  sampler: BodySampler, index: number, fin: FinOutline, x: number, y: number, scratch: FinScratch, samples: ViewSamples, i: number,
): void {
  const { blank, turn } = sampler
  const { place, section } = scratch
  const length = blank.shape.length
  const facing = turn.cos >= 0 ? 1 : -1
  const angle = rayAngle(fin, x, y)
  const share = rootToTip(fin, x, y, angle)
  const rim = Math.max(0, place.rim)
  const slope = slopeAcrossRays(fin, angle)
  const onBody = Math.min(length, Math.max(0, x))
  const t = tOfShare(onBody / length)
  blank.profile.section(t, section)
  samples.part[i] = PART_FIN + index
  samples.U[i] = x - fin.rootX
  samples.V[i] = y - fin.rootY
  samples.u[i] = blank.table.u[Math.round(t * (TABLE_ROWS - 1))] ?? 0
  samples.v[i] = y >= section.c ? 0 : 1
  samples.side[i] = facing
  samples.section[2 * i] = y - section.c
  samples.section[2 * i + 1] = 0
  samples.bodyNormal[3 * i] = 0
  samples.bodyNormal[3 * i + 1] = 0
  samples.bodyNormal[3 * i + 2] = facing
  samples.rootToTip[i] = share
  samples.rim[i] = rim
  samples.raySlope[i] = slope
  const outside = Math.max(0, Math.abs(y - section.c) - section.h)
  const beyond = x > length ? x - length : 0
  const fromBody = Math.hypot(outside, beyond)
  samples.occlusion[i] = (1 - ROOT_SHADE * Math.exp(-fromBody / (1.1 * length / 100 + 0.3))) * (1 - ROOT_DARKER * (1 - share) ** 2)
  const s = rim < RIM_ROUND_MM ? Math.min(0.9, 1 - rim / RIM_ROUND_MM) : 0
  const round = s / Math.sqrt(1 - s * s)
  // Across a ray: a quarter turn from the ray's own direction.
  const ax = -Math.sin(angle) * slope
  const ay = Math.cos(angle) * slope
  writeTurned(turn, round * place.rimX - ax, round * place.rimY - ay, facing, samples.normal, i)
  const gloss = GLOSS_RIM * round
  writeTurned(turn, gloss * place.rimX - GLOSS_RAYS * ax, gloss * place.rimY - GLOSS_RAYS * ay, facing, samples.glossNormal, i)
}

/**
 * How far a place on a fin stands out of the body on the side turned to the viewer, mm. There the fin is before the body;
 * negative or -Infinity where the body is before the fin.
 */
export function standsOut(sampler: BodySampler, x: number, y: number, scratch: FinScratch): number {
  const { blank, turn } = sampler
  if (turn.sin === 0 || x <= 0 || x >= blank.shape.length) return -Infinity
  const { section } = scratch
  blank.profile.section(tOfShare(x / blank.shape.length), section)
  return (y - section.c) * turn.sin > 0 ? Math.abs(y - section.c) - section.h : -Infinity
}
