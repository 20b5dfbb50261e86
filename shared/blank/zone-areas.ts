import type { FinOutline } from './fin-outline'
import type { PreparedBlank } from './prepared-blank'
import { newSection } from './profile'
import { newSurfacePoint, surfacePoint } from './surface-point'
import { fillSurfaceRow, newSurfaceRow, rowV, shareOfV } from './surface-table'
import { BODY_ZONES, finZone, zoneDistance, type ZoneName } from './zones'

const STEPS_ALONG = 160
const STEPS_ROUND = 80

/** Both faces of a fin outside the body, mm². What the body hides of its root is counted too: it is small. */
function finArea(fin: FinOutline): number {
  let sum = 0
  fin.xs.forEach((x, i) => {
    const j = (i + 1) % fin.xs.length
    sum += x * (fin.ys[j] ?? 0) - (fin.xs[j] ?? 0) * (fin.ys[i] ?? 0)
  })
  return Math.abs(sum)
}

/**
 * Area of every zone of a blank, mm², both flanks and both faces of fins: what a coat on that zone has to cover.
 * Zones overlap, so they do not add up to the body; back, both flanks and belly do (within 0.3 %).
 */
export function zoneAreas(blank: PreparedBlank): Map<ZoneName, number> {
  const section = newSection()
  const point = newSurfacePoint()
  const row = newSurfaceRow()
  const areas = new Map<ZoneName, number>(BODY_ZONES.map(zone => [zone, 0]))
  const [dt, df] = [1 / STEPS_ALONG, Math.PI / STEPS_ROUND]
  for (let i = 0; i < STEPS_ALONG; i++) {
    blank.profile.section((i + 0.5) * dt, section)
    fillSurfaceRow(blank.table, section.t, row)
    for (let k = 0; k < STEPS_ROUND; k++) {
      const phi = (k + 0.5) * df
      surfacePoint(section, phi, point)
      const cell = 2 * point.area * dt * df
      const v = shareOfV(row, rowV(row, phi))
      // A cell on the edge of a zone counts in part, by how far its middle is inside.
      const reach = Math.max(1e-9, Math.sqrt(point.area * dt * df))
      for (const zone of BODY_ZONES) {
        const share = Math.min(1, Math.max(0, 0.5 + zoneDistance(blank, zone, row.u, v) / reach))
        if (share > 0) areas.set(zone, (areas.get(zone) ?? 0) + share * cell)
      }
    }
  }
  areas.set('body', blank.measures.area)
  blank.fins.forEach(fin => areas.set(finZone(fin.id), finArea(fin)))
  return areas
}
