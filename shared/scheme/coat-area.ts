import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { newSection } from '#shared/blank/profile'
import { newSurfacePoint, surfacePoint } from '#shared/blank/surface-point'
import { fillSurfaceRow, newSurfaceRow, rowV, shareOfV } from '#shared/blank/surface-table'
import { zoneAreas } from '#shared/blank/zone-areas'
import { finZone, zoneDistance } from '#shared/blank/zones'
import type { BodyZone } from '#shared/blank/zone-names'
import { type Coat, GIRTH_ZONES, LENGTH_ZONES, type Where, type ZoneName } from './coat'
import type { Mark } from './mark'

const STEPS_ALONG = 120
const STEPS_ROUND = 48

/** A blank cut into small cells with their distances to every zone's edge: worked out once a blank. */
export interface AreaCells {
  length: number
  /** Surface of the body, mm². */
  body: number
  /** Both faces of each fin, mm², by the fin's id. */
  fins: ReadonlyMap<string, number>
  cells: readonly { area: number, u: number, inside: Readonly<Record<ZoneName, number>> }[]
}

const BODY_ZONE: Readonly<Record<ZoneName, BodyZone>> = {
  'back': 'back', 'upper flank': 'upper-flank', 'lower flank': 'lower-flank', 'belly': 'belly', 'head': 'head', 'gill cover': 'gill-cover', 'trunk': 'trunk', 'tail': 'tail',
}

/** Cuts a blank into cells, both flanks at once. */
export function areaCells(blank: PreparedBlank): AreaCells {
  const section = newSection()
  const point = newSurfacePoint()
  const row = newSurfaceRow()
  const areas = zoneAreas(blank)
  const cells: { area: number, u: number, inside: Record<ZoneName, number> }[] = []
  const [dt, df] = [1 / STEPS_ALONG, Math.PI / STEPS_ROUND]
  for (let i = 0; i < STEPS_ALONG; i++) {
    blank.profile.section((i + 0.5) * dt, section)
    fillSurfaceRow(blank.table, section.t, row)
    for (let k = 0; k < STEPS_ROUND; k++) {
      const phi = (k + 0.5) * df
      surfacePoint(section, phi, point)
      const v = shareOfV(row, rowV(row, phi))
      const at = (zone: ZoneName) => zoneDistance(blank, BODY_ZONE[zone], row.u, v)
      cells.push({
        area: 2 * point.area * dt * df,
        u: row.u,
        inside: {
          'back': at('back'), 'upper flank': at('upper flank'), 'lower flank': at('lower flank'), 'belly': at('belly'),
          'head': at('head'), 'gill cover': at('gill cover'), 'trunk': at('trunk'), 'tail': at('tail'),
        },
      })
    }
  }
  const fins = new Map(blank.shape.fins.map(fin => [fin.id, areas.get(finZone(fin.id)) ?? 0]))
  return { length: blank.shape.length, body: blank.measures.area, fins, cells }
}

function bodyArea({ zones, reach, along }: Where, { cells }: AreaCells): number {
  const girth = GIRTH_ZONES.filter(zone => zones.includes(zone))
  const length = LENGTH_ZONES.filter(zone => zones.includes(zone))
  const lies = (any: readonly ZoneName[], inside: Readonly<Record<ZoneName, number>>) => any.length === 0 || any.some(zone => inside[zone] + reach > 0)
  return cells.reduce((sum, cell) => {
    const within = !along || (cell.u >= along.from && cell.u <= along.to)
    return within && lies(girth, cell.inside) && lies(length, cell.inside) ? sum + cell.area : sum
  }, 0)
}

function finsArea(where: Where, { fins }: AreaCells): number {
  return [...fins].reduce((sum, [id, area]) => {
    const share = where.fins.filter(fin => fin.fin === 'all' || fin.fin === id).reduce((most, fin) => Math.max(most, fin.root, fin.tip), 0)
    return sum + share * area
  }, 0)
}

const mean = ([a, b]: readonly [number, number]) => (Math.abs(a) + Math.abs(b)) / 2

/** Roughly how much of one flank a mark covers, mm²: lines by length and width, dots by radius, patterns by their share of the flank. */
function markArea(mark: Mark, { length, body }: AreaCells): number {
  const girth = body / (2 * length)
  const flank = body / 2
  switch (mark.kind) {
    case 'strokes': return mark.strokes.reduce((sum, { points, width }) => sum + mean(width) * points.slice(1).reduce((way, [u, v], i) => {
      const [u0, v0] = points[i] ?? [u, v]
      return way + Math.hypot((u - u0) * length, (v - v0) * girth)
    }, 0), 0)
    case 'fan': return mark.count * mean(mark.length) * mean(mark.width) * (length / 100) ** 2
    case 'dots': return mark.dots.reduce((sum, [,, radius]) => sum + Math.PI * Math.max(0, radius + mark.grow) ** 2, 0)
    case 'scatter': return mark.count * Math.PI * Math.max(0, mean(mark.radius) + mark.grow) ** 2
    case 'outline': return Math.abs(mark.points.reduce((sum, [u, v], i) => {
      const [u1, v1] = mark.points[(i + 1) % mark.points.length] ?? [u, v]
      return sum + u * v1 - u1 * v
    }, 0)) / 2 * length * girth
    case 'worm tracks': return flank * Math.min(1, mark.width / mark.wavelength)
    case 'torn sponge': return flank * (1 - mark.threshold) / 2
  }
}

/** Where a coat is laid, mm²: on the body, both flanks, and on the fins, both faces. */
export interface CoatAreaParts { body: number, fins: number }

/**
 * Area that a coat is laid on, body and fins apart. Zones reach as far as the coat's reach; what fades out beyond an edge makes
 * up for what fades within it. Masks do not lessen it: they catch what they keep off.
 * @accuracy zones within 2 %; marks a rough estimate
 */
export function coatAreaParts(coat: Pick<Coat, 'where' | 'marks'>, cells: AreaCells): CoatAreaParts {
  const fins = finsArea(coat.where, cells)
  if (coat.marks.length > 0) return { fins, body: Math.min(cells.body, 2 * coat.marks.reduce((sum, mark) => sum + markArea(mark, cells), 0)) }
  return { fins, body: coat.where.body ? bodyArea(coat.where, cells) : 0 }
}

/** Area that a coat is laid on, mm², body and fins together. */
export function coatArea(coat: Pick<Coat, 'where' | 'marks'>, cells: AreaCells): number {
  const { body, fins } = coatAreaParts(coat, cells)
  return body + fins
}
