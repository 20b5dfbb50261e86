/** Which way the nose points in the picture. */
export type NoseToward = 'left' | 'right'

/**
 * How a blank is looked at: straight on, without perspective, turned about its long axis.
 *
 * View frame: X right, Y up, Z toward the viewer. `roll` in degrees: 0 shows the left flank, 90 the back,
 * 180 the right flank (belly up), 270 the belly. `nose: 'right'` turns the finished picture half round in
 * its own plane, so roll 180 with the nose right shows the right flank, back up.
 */
export interface View {
  roll: number
  nose: NoseToward
  /** Picture size, whole pixels. */
  width: number
  height: number
  /** Pixels per mm. */
  scale: number
  /** Where the middle of the axis between nose and tail, (L/2, 0, 0), falls: pixels from the left and from the top. */
  centreX: number
  centreY: number
}

/** The parts of a view that turn a body direction into a picture direction. */
export interface ViewTurn {
  cos: number
  sin: number
  /** 1 with the nose left, -1 with the nose right. */
  way: 1 | -1
}

/** Cosine, sine and way round of a view. */
export function viewTurn(view: Pick<View, 'roll' | 'nose'>): ViewTurn {
  // Quarter turns are exact, so that opposite views mirror each other to the last bit.
  const quarters = (((view.roll / 90) % 4) + 4) % 4
  const exact = Number.isInteger(quarters)
  const radians = view.roll * Math.PI / 180
  return {
    cos: exact ? [1, 0, -1, 0][quarters] ?? 1 : Math.cos(radians),
    sin: exact ? [0, 1, 0, -1][quarters] ?? 0 : Math.sin(radians),
    way: view.nose === 'left' ? 1 : -1,
  }
}

/** A direction of the body frame in the view frame: X right, Y up, Z toward the viewer. */
export function turnToView(turn: ViewTurn, x: number, y: number, z: number): [x: number, y: number, z: number] {
  return [
    turn.way * x,
    turn.way * (y * turn.cos - z * turn.sin),
    y * turn.sin + z * turn.cos,
  ]
}

/** Where a point of the body, mm, falls in the picture, pixels from the left and top. `length` is the blank's. */
export function projectPoint(view: View, length: number, x: number, y: number, z: number): [px: number, py: number] {
  const turn = viewTurn(view)
  const [X, Y] = turnToView(turn, x - length / 2, y, z)
  return [view.centreX + view.scale * X, view.centreY - view.scale * Y]
}
