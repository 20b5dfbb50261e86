import type { PreparedBlank } from '#shared/blank/prepared-blank'
import { placeInSideView, type BodyVector, type Side } from '#shared/blank/surface-coordinates'

/** An eye's seat on a flank: its middle, and the three directions it is laid out in. */
export interface EyeSeat {
  middle: BodyVector
  facing: BodyVector
  toTail: BodyVector
  up: BodyVector
  radius: number
}

/** Where the eye of a flank sits. Round eyes look forward whatever the meridian does: their long way is the body's axis, laid into the skin. */
export function eyeSeat(blank: PreparedBlank, side: Side): EyeSeat {
  const { eye } = blank.shape
  const { position, normal: [nx, ny, nz], toTail } = placeInSideView(blank, eye.x, eye.y, side)
  const size = Math.sqrt(Math.max(1e-9, 1 - nx * nx))
  const tail: BodyVector = size > 0.2 ? [size, -nx * ny / size, -nx * nz / size] : toTail
  return {
    middle: position, facing: [nx, ny, nz], toTail: tail, radius: eye.radius,
    up: [side * (ny * tail[2] - nz * tail[1]), side * (nz * tail[0] - nx * tail[2]), side * (nx * tail[1] - ny * tail[0])],
  }
}
