import { fitView } from '#shared/blank/fit-view'
import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { placeOnSurface } from '#shared/blank/surface-coordinates'
import { projectPoint, turnToView, viewTurn } from '#shared/blank/view'
import { finOfZone, type ZoneName } from '#shared/blank/zone-names'
import { PICTURE_SIDES, type PictureSide } from '#shared/picture/picture-sides'

/** Where each zone of the body is judged: shares of the length and of the half girth. */
const JUDGED: Readonly<Record<string, readonly [u: number, v: number]>> = {
  'back': [0.45, 0.1], 'upper-flank': [0.5, 0.36], 'lower-flank': [0.5, 0.62], 'belly': [0.45, 0.86], 'head': [0.1, 0.45], 'gill-cover': [0.2, 0.55], 'tail': [0.92, 0.5],
}
/** Less turned to the viewer than this it is not seen. */
const EDGE_ON = 0.12

/** Where the ring of a zone stands in a picture, shares of its width and height; null where the zone is turned away. */
export function zoneRing(blank: PreparedBlank, zone: ZoneName, side: PictureSide, tall: number): { x: number, y: number } | null {
  const view = fitView(blank, { width: 1000, height: Math.round(1000 * tall), ...PICTURE_SIDES[side] })
  const at = (x: number, y: number, z: number) => {
    const [px, py] = projectPoint(view, blank.shape.length, x, y, z)
    return { x: px / view.width, y: py / view.height }
  }
  const finId = finOfZone(zone)
  if (finId !== undefined) {
    const fin = blank.fins.find(each => each.id === finId)
    if (!fin || side === 'back' || side === 'belly') return null
    const mean = (values: ArrayLike<number>) => Array.from(values).reduce((sum, each) => sum + each, 0) / values.length
    return at(mean(fin.xs), mean(fin.ys), 0)
  }
  const judged = JUDGED[zone]
  if (!judged) return null
  const { position, normal } = placeOnSurface(blank, ...judged, side === 'right flank' ? -1 : 1)
  return turnToView(viewTurn(view), ...normal)[2] < EDGE_ON ? null : at(...position)
}
