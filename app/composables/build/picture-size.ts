import type { BlankShape } from '#shared/blank/blank-shape'
import { sideOutline, type SideOutline } from '#shared/blank/side-outline'

/** Scale of the wall, px for each mm: every blank on it is drawn at the same. */
export const WALL_SCALE = 2.95
/** The wall's scale on a phone, as a share of that. */
export const HAND_SHARE = 0.7
/** Empty border of a painted picture on both sides together, as a share of its smaller side: as `fitView` leaves it. */
const BORDER = 0.12

/** A picture's size, px. */
export interface PictureSize { width: number, height: number }

/**
 * Size of the picture in which a blank, painted to fill it, comes out at a scale.
 * @param scale px for each mm, > 0
 */
export function pictureSize(shape: BlankShape, scale: number, outline: SideOutline = sideOutline(shape)): PictureSize {
  if (!(scale > 0)) throw new RangeError('A picture has a scale above 0.')
  const { width, height } = outline.box
  const wide = 2 * Math.max(...shape.stations.map(station => station.halfWidth), (shape.lip?.width ?? 0) / 2)
  const tall = Math.max(height, wide)
  const high = tall <= width ? tall / (1 - BORDER) : tall + BORDER * (width / (1 - BORDER))
  const across = tall <= width ? width + BORDER * high : width / (1 - BORDER)
  return { width: Math.round(across * scale), height: Math.round(high * scale) }
}

/** Address of a scheme's picture, painted by the server. */
export function pictureAddress(schemeId: string, { width, height }: PictureSize, more: Readonly<Record<string, string | number>> = {}): string {
  const query = new URLSearchParams({ width: String(width), height: String(height) })
  for (const [name, value] of Object.entries(more)) query.set(name, String(value))
  return `/api/schemes/${schemeId}/picture?${query.toString()}`
}
