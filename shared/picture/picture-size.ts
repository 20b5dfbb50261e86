import type { BlankShape } from '#shared/blank/blank-shape'
import { sideOutline, type SideOutline } from '#shared/blank/side-outline'

/** Scale of the wall, px for each mm: every blank on it is drawn at the same. */
export const WALL_SCALE = 2.95
/** The wall's scale on a phone, as a share of that. */
export const HAND_SHARE = 0.7
/** Picture pixels for each px on the wall, so that fine meshes stay sharp. */
export const WALL_SHARPNESS = 1.5
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
  const { width, height } = frameOf(shape, outline)
  return { width: Math.round(width * scale), height: Math.round(height * scale) }
}

/** What a picture of that size shows, mm with y down, as an SVG viewBox: lines drawn in it lie where the paint will. */
export function pictureViewBox(shape: BlankShape, outline: SideOutline): string {
  const { x, y, width, height } = frameOf(shape, outline)
  return [x, y, width, height].map(figure => Math.round(figure * 100) / 100).join(' ')
}

interface Box extends PictureSize { x: number, y: number }

function frameOf(shape: BlankShape, outline: SideOutline): Box {
  const { x, y, width, height } = boxOf(shape, outline)
  const wide = 2 * Math.max(...shape.stations.map(station => station.halfWidth), (shape.lip?.width ?? 0) / 2)
  const tall = Math.max(height, wide)
  const high = tall <= width ? tall / (1 - BORDER) : tall + BORDER * (width / (1 - BORDER))
  const across = tall <= width ? width + BORDER * high : width / (1 - BORDER)
  return { x: x + (width - across) / 2, y: y + (height - high) / 2, width: across, height: high }
}

/** The box `fitView` fits, mm: the outline with its rings and fins, and the lip's tip with its thickness all round. */
function boxOf(shape: BlankShape, { body, fins, rings }: SideOutline): Box {
  const points: (readonly [number, number])[] = [
    [0, 0], [shape.length, 0], ...body, ...fins.flatMap(fin => fin.points),
    ...rings.flatMap(({ x, y, radius }) => [[x - 1.2 * radius, y - 1.2 * radius], [x + 1.2 * radius, y + 1.2 * radius]] as const),
  ]
  if (shape.lip) {
    const { x, y, length, thickness } = shape.lip
    const turn = shape.lip.angle * Math.PI / 180
    const tip = [x - length * Math.cos(turn), length * Math.sin(turn) - y] as const
    points.push([tip[0] - thickness, tip[1] - thickness], [tip[0] + thickness, tip[1] + thickness])
  }
  const [xs, ys] = [points.map(point => point[0]), points.map(point => point[1])]
  const [x, y] = [Math.min(...xs), Math.min(...ys)]
  return { x, y, width: Math.max(...xs) - x, height: Math.max(...ys) - y }
}

/** Size of the picture that hangs on the wall, pixels: asked for by the page and painted ahead for it. */
export function wallPictureSize(shape: BlankShape, outline?: SideOutline): PictureSize {
  const { width, height } = pictureSize(shape, WALL_SCALE, outline)
  return { width: Math.round(width * WALL_SHARPNESS), height: Math.round(height * WALL_SHARPNESS) }
}
