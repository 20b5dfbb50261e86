import type { BlankShape } from '#shared/blank/blank-shape'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { zoneAreas } from '#shared/blank/zone-areas'
import { zoneOutline } from '#shared/blank/zone-outline'
import { BODY_ZONES, finZone, ZONE_LABELS, type ZoneName } from '#shared/blank/zone-names'
import { svgPath } from '#shared/blank/side-outline'

/** A zone with what a coat on it has to cover, and its outline in the side view as SVG path data. */
export interface MeasuredZone { zone: ZoneName, label: string, areaMm2: number, path: string }

/** A blank in figures. Fins count in the painted area, not in the volume. */
export interface MeasuredBlank {
  length: number
  height: number
  width: number
  /** Body without fins, mm². */
  bodyMm2: number
  /** Both faces of all fins, mm². */
  finsMm2: number
  volumeMm3: number
  /** Body zones from back to belly and nose to tail, then the fins. Zones overlap. */
  zones: MeasuredZone[]
}

const finLabel = (id: string) => `${id.replaceAll('-', ' ').replace(/^./, first => first.toUpperCase())} fin`

/** Measures a blank (about 0.1 s). */
export function measureBlank(shape: BlankShape): MeasuredBlank {
  const blank = prepareBlank(shape)
  const areas = zoneAreas(blank)
  const area = (zone: ZoneName) => areas.get(zone) ?? 0
  const zoneOf = (zone: ZoneName, label: string) => ({ zone, label, areaMm2: area(zone), path: svgPath(zoneOutline(blank, zone)) })
  const fins = shape.fins.map(fin => zoneOf(finZone(fin.id), finLabel(fin.id)))
  const { length, height, width, volume } = blank.measures
  return {
    length, height, width,
    bodyMm2: blank.measures.area,
    finsMm2: fins.reduce((sum, fin) => sum + fin.areaMm2, 0),
    volumeMm3: volume,
    zones: [...BODY_ZONES.map(zone => zoneOf(zone, ZONE_LABELS[zone])), ...fins],
  }
}
